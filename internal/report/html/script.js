"use strict";
(() => {
  const D = JSON.parse(document.getElementById("data").textContent);
  const W = D.words, PAGE = 100;
  const by = (id) => document.getElementById(id);
  const form = document.querySelector(".filter"), body = by("rows"), more = by("more"), shown = by("shown");
  const FIELDS = ["site", "bundle", "topic", "duty", "status", "severity"];
  const get = {
    site: (l) => W[l.s], bundle: (l) => W[l.b], topic: (l) => D.duties[l.d].t, duty: (l) => D.duties[l.d].i,
    status: (l) => D.statuses[l.t], severity: (l) => D.duties[l.d].s,
  };
  const subject = (l) => W[l.k] + " " + l.u;
  const marks = {};
  document.querySelectorAll(".count").forEach((c) => { marks[c.className.replace("count s-", "")] = c.querySelector(".mark"); });
  const hay = D.lines.map((l) => [l.i, subject(l), W[l.s], D.duties[l.d].n, D.duties[l.d].i, W[l.m], W[l.c], ...files(l)].join("\n").toLowerCase());
  function files(l) { const out = []; for (let i = 0; l.w && i < l.w.length; i += 3) out.push(W[l.w[i]], W[l.w[i + 1]]); return out; }

  let state = {}, list = [], count = PAGE;
  function read() {
    const hash = decodeURIComponent(location.hash.slice(1)), at = hash.indexOf("?");
    const part = at < 0 ? hash : hash.slice(0, at);
    if (at < 0 && part !== "register" && part !== "") return false;
    const q = new URLSearchParams(at < 0 ? "" : location.hash.slice(1 + location.hash.slice(1).indexOf("?") + 1));
    state = {};
    for (const [k, v] of q) if (v !== "") state[k] = v;
    return true;
  }
  function address() {
    const q = new URLSearchParams();
    for (const k of [...FIELDS, "text", "sort"]) if (state[k]) q.set(k, state[k]);
    const text = q.toString();
    return "#register" + (text ? "?" + text : "");
  }
  const sorts = {
    status: (a, b) => a.t - b.t, due: (a, b) => (a.e || "9999").localeCompare(b.e || "9999"), subject: (a, b) => subject(a).localeCompare(subject(b), "en", { numeric: true }),
    duty: (a, b) => D.duties[a.d].n.localeCompare(D.duties[b.d].n, "en"), cite: (a, b) => W[a.c].localeCompare(W[b.c], "en", { numeric: true }),
  };
  function apply() {
    const wanted = FIELDS.filter((f) => state[f]), words = (state.text || "").toLowerCase().split(/\s+/).filter(Boolean);
    list = [];
    D.lines.forEach((l, i) => {
      for (const f of wanted) if (get[f](l) !== state[f]) return;
      for (const w of words) if (!hay[i].includes(w)) return;
      list.push(l);
    });
    const key = (state.sort || "").replace("-", "");
    if (sorts[key]) list.sort((a, b) => (state.sort[0] === "-" ? -1 : 1) * sorts[key](a, b));
    document.querySelectorAll("th[data-sort]").forEach((th) => {
      if (th.dataset.sort === key) th.setAttribute("aria-sort", state.sort[0] === "-" ? "descending" : "ascending"); else th.removeAttribute("aria-sort");
    });
    count = PAGE;
    for (const f of FIELDS) form.elements[f].value = state[f] || "";
    if (form.elements.text.value !== (state.text || "")) form.elements.text.value = state.text || "";
    draw();
  }
  const el = (tag, text, cls) => { const e = document.createElement(tag); if (text !== undefined) e.textContent = text; if (cls) e.className = cls; return e; };
  function rowOf(l) {
    const tr = el("tr"), status = D.statuses[l.t], duty = D.duties[l.d];
    const st = tr.appendChild(el("td", undefined, "st s-" + status));
    st.append(marks[status].cloneNode(true), " " + status);
    if (l.a) st.append(el("small", "accepted until " + l.a[2]));
    const due = tr.appendChild(el("td", l.e || "", "day"));
    if (l.v) due.append(el("small", l.v + (l.v === 1 ? " day over" : " days over")));
    const who = tr.appendChild(el("td", subject(l)));
    who.append(el("small", W[l.s]));
    const what = tr.appendChild(el("td")), open = what.appendChild(el("button", duty.n, "open"));
    open.type = "button"; open.setAttribute("aria-expanded", "false");
    open.addEventListener("click", () => toggle(tr, open, l));
    what.append(el("span", W[l.m], "msg"));
    tr.append(el("td", W[l.c]));
    return tr;
  }
  function toggle(tr, open, l) {
    if (open.getAttribute("aria-expanded") === "true") { open.setAttribute("aria-expanded", "false"); tr.nextSibling.remove(); return; }
    open.setAttribute("aria-expanded", "true");
    tr.after(details(l));
  }
  function pairs(dl, flat) { for (let i = 0; flat && i < flat.length; i += 2) dl.append(el("dt", W[flat[i]]), el("dd", W[flat[i + 1]])); }
  function details(l) {
    const tr = el("tr", undefined, "more"), td = tr.appendChild(el("td")), duty = D.duties[l.d];
    td.colSpan = 5;
    const dl = td.appendChild(el("dl"));
    const say = (name, text) => { if (text) dl.append(el("dt", name), el("dd", text)); };
    say("What the law asks", duty.a); say("Paragraph", W[l.c]); say("What to do", W[l.r]); say("Due", l.e); say("Done", l.o); say("Severity", duty.s); say("Bundle", W[l.b]);
    if (l.a) { say("Accepted because", l.a[0]); say("Accepted by", l.a[1]); say("Accepted until", l.a[2]); }
    const id = el("dd"), link = id.appendChild(el("a", l.i, "id"));
    link.href = "#register?text=" + l.i; dl.append(el("dt", "Finding"), id);
    if (l.f || l.l || l.h) {
      td.append(el("h4", "How we know"));
      const how = td.appendChild(el("dl"));
      pairs(how, l.f); pairs(how, l.h);
      for (let i = 0; l.l && i < l.l.length; i += 4) {
        const note = W[l.l[i + 3]] === "text" ? "" : ", not read in the official text (" + W[l.l[i + 3]] + ")";
        how.append(el("dt", W[l.l[i]]), el("dd", W[l.l[i + 1]] + ", " + W[l.l[i + 2]] + note));
      }
    }
    if (l.w) {
      td.append(el("h4", "Records it rests on"));
      const ul = td.appendChild(el("ul"));
      for (let i = 0; i < l.w.length; i += 3) ul.append(el("li", W[l.w[i]] + (W[l.w[i + 1]] ? ", " + W[l.w[i + 1]] + ", row " + l.w[i + 2] : "")));
    }
    const part = document.getElementById("of-" + W[l.s] + "-" + W[l.k] + "-" + l.u);
    if (part) { const a = el("a", "All of " + subject(l)); a.href = "#" + part.id; td.append(el("p")); td.lastChild.append(a); }
    return tr;
  }
  function draw() {
    const part = document.createDocumentFragment();
    for (const l of list.slice(0, count)) part.append(rowOf(l));
    body.replaceChildren(part);
    more.hidden = list.length <= count;
    more.textContent = "Show " + Math.min(PAGE, list.length - count) + " more of " + list.length;
    shown.textContent = list.length === D.lines.length ? list.length + " findings." : list.length + " of " + D.lines.length + " findings.";
  }
  function go(push) { const to = address(); if (location.hash !== to) history[push ? "pushState" : "replaceState"](null, "", to); apply(); }
  function options() {
    for (const f of FIELDS) {
      const seen = new Map();
      for (const l of D.lines) { const v = get[f](l); seen.set(v, (seen.get(v) || 0) + 1); }
      const keys = [...seen.keys()];
      if (f === "status") keys.sort((a, b) => D.statuses.indexOf(a) - D.statuses.indexOf(b)); else keys.sort();
      const all = el("option", "all"); all.value = "";
      form.elements[f].replaceChildren(all, ...keys.map((k) => { const o = el("option", k + " (" + seen.get(k) + ")"); o.value = k; return o; }));
      form.elements[f].addEventListener("change", () => { set(f, form.elements[f].value); go(true); });
    }
  }
  function set(key, value) { if (value) state[key] = value; else delete state[key]; }
  function reveal() {
    const id = decodeURIComponent(location.hash.slice(1)), part = id && document.getElementById(id);
    if (part && part.tagName === "DETAILS") { part.open = true; part.scrollIntoView(); part.querySelector("summary").focus({ preventScroll: true }); }
  }
  form.hidden = false;
  options();
  let wait;
  form.elements.text.addEventListener("input", () => { clearTimeout(wait); wait = setTimeout(() => { set("text", form.elements.text.value.trim()); go(false); }, 60); });
  form.addEventListener("submit", (e) => e.preventDefault());
  form.addEventListener("reset", (e) => { e.preventDefault(); state = {}; go(true); });
  document.querySelectorAll("th[data-sort]").forEach((th) => {
    const b = el("button", th.textContent); b.type = "button"; th.replaceChildren(b);
    b.addEventListener("click", () => { const k = th.dataset.sort; state.sort = state.sort === k ? "-" + k : k; go(true); });
  });
  document.addEventListener("click", (e) => {
    const a = e.target.closest("a[data-filter]");
    if (!a) return;
    e.preventDefault();
    state = Object.fromEntries(new URLSearchParams(a.dataset.filter));
    go(true);
    by("register").scrollIntoView();
    shown.tabIndex = -1; shown.focus({ preventScroll: true });
  });
  more.addEventListener("click", () => { const from = count; count += PAGE; draw(); const b = body.querySelectorAll(".open")[from]; if (b) b.focus(); });
  let closed = [];
  addEventListener("beforeprint", () => { closed = [...document.querySelectorAll("details.subject:not([open])")].slice(0, 400); closed.forEach((d) => { d.open = true; }); const old = count; count = Math.min(list.length, 5000); draw(); count = old; });
  addEventListener("afterprint", () => { closed.forEach((d) => { d.open = false; }); draw(); });
  const follow = () => { if (read()) { apply(); if (location.hash.includes("?")) by("register").scrollIntoView(); } else { if (!list.length) apply(); reveal(); } };
  addEventListener("hashchange", follow);
  addEventListener("popstate", () => { if (read()) apply(); });
  follow();
  document.documentElement.dataset.ready = "yes";
})();
