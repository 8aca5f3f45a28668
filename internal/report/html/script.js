"use strict";
(() => {
  const by = (id) => document.getElementById(id);
  const D = JSON.parse(by("data").textContent), W = D.words, PAGE = 50, PRINTED = 5000, OPENED = 400;
  const form = document.querySelector(".filter"), body = by("rows"), more = by("more"), shown = by("shown");
  const get = {
    site: (l) => W[l.s], bundle: (l) => W[l.b], topic: (l) => D.duties[l.d].t, duty: (l) => D.duties[l.d].i,
    status: (l) => D.statuses[l.t], severity: (l) => D.duties[l.d].s, accepted: (l) => (l.a ? "yes" : "no"),
  };
  const FIELDS = Object.keys(get), known = {};
  const subject = (l) => W[l.k] + " " + l.u;
  const collator = new Intl.Collator("en", { numeric: true });
  let state = {}, list = [], count = PAGE, hay, applied;

  // The address holds the filter: #register?status=gap&text=K01&sort=-due
  const decoded = (text) => { try { return decodeURIComponent(text); } catch { return text; } };
  const part = () => decoded(location.hash.slice(1));
  function read() {
    const hash = location.hash.slice(1), at = hash.indexOf("?"), name = at < 0 ? hash : hash.slice(0, at);
    if (name !== "register" && name !== "") return false;
    state = {};
    for (const [k, v] of new URLSearchParams(at < 0 ? "" : hash.slice(at + 1))) if (FIELDS.includes(k) || k === "text" || k === "sort") set(k, v.trim());
    return true;
  }
  function address() {
    const q = new URLSearchParams();
    for (const k of [...FIELDS, "text", "sort"]) if (state[k]) q.set(k, state[k]);
    const text = q.toString();
    return "#register" + (text ? "?" + text : "");
  }
  function go(push) { const to = address(); if (location.hash !== to) history[push ? "pushState" : "replaceState"](null, "", to); apply(); }
  function set(key, value) { if (value) state[key] = value; else delete state[key]; }

  // Filtering and sorting.
  const last = (a, b) => (a ? 0 : 1) - (b ? 0 : 1);
  function byWords(of) {
    let places;
    return (a, b, way) => { places ||= ranked(of); return way * (places.get(a) - places.get(b)); };
  }
  function ranked(of) {
    const place = new Map();
    let before, n = 0;
    for (const word of [...new Set(D.lines.map(of))].sort(collator.compare)) {
      if (before !== undefined && collator.compare(before, word)) n++;
      place.set(before = word, n);
    }
    return new Map(D.lines.map((l) => [l, place.get(of(l))]));
  }
  const sorts = {
    status: (a, b, way) => way * (a.t - b.t),
    due: (a, b, way) => last(a.e, b.e) || way * (a.e < b.e ? -1 : a.e > b.e ? 1 : 0),
    subject: byWords(subject), duty: byWords((l) => D.duties[l.d].n), cite: byWords((l) => W[l.c]),
  };
  function searched(l) {
    const files = [];
    for (let i = 0; l.w && i < l.w.length; i += 3) files.push(W[l.w[i]], W[l.w[i + 1]]);
    return [l.i, subject(l), W[l.s], D.duties[l.d].n, D.duties[l.d].i, W[l.m], W[l.c], ...files].join("\n").toLowerCase();
  }
  function apply() {
    const wanted = FIELDS.filter((f) => state[f]), words = (state.text || "").toLowerCase().split(/\s+/).filter(Boolean);
    if (words.length) hay ||= D.lines.map(searched);
    list = D.lines.filter((l, i) => wanted.every((f) => get[f](l) === state[f]) && words.every((w) => hay[i].includes(w)));
    const down = (state.sort || "")[0] === "-", key = (state.sort || "").slice(down ? 1 : 0);
    if (Object.hasOwn(sorts, key)) list.sort((a, b) => sorts[key](a, b, down ? -1 : 1));
    for (const th of document.querySelectorAll("th[data-sort]")) {
      if (th.dataset.sort === key) th.setAttribute("aria-sort", down ? "descending" : "ascending"); else th.removeAttribute("aria-sort");
    }
    for (const f of FIELDS) form.elements[f].value = state[f] || "";
    if (form.elements.text.value.trim() !== (state.text || "")) form.elements.text.value = state.text || "";
    count = PAGE;
    applied = address();
    draw();
    say(wanted);
  }
  function say(wanted) {
    const some = [...wanted.map((f) => f + " " + state[f]), ...(state.text ? ["text “" + state.text + "”"] : [])];
    if (!some.length) { shown.textContent = D.says; return; }
    const kept = list.filter((l) => l.a).length, odd = wanted.filter((f) => !known[f].has(state[f]));
    let text = list.length + " of " + D.lines.length + " listed findings: " + some.join(", ") + ".";
    if (kept && !state.accepted) text += " The employer has accepted " + kept + " of these; accepted is not met.";
    for (const f of odd) text += " No listed finding has the " + f + " “" + state[f] + "”.";
    shown.textContent = text;
  }

  // The rows.
  const el = (tag, text, cls) => { const e = document.createElement(tag); if (text !== undefined) e.textContent = text; if (cls) e.className = cls; return e; };
  const marks = Object.fromEntries(D.statuses.map((s) => [s, document.querySelector(".count.s-" + s + " .mark")]));
  function draw() {
    const rows = document.createDocumentFragment();
    for (const l of list.slice(0, count)) rows.append(rowOf(l));
    body.replaceChildren(rows);
    more.hidden = list.length <= count;
    more.textContent = "Show " + Math.min(PAGE, list.length - count) + " more of " + list.length;
  }
  function rowOf(l) {
    const tr = el("tr"), status = D.statuses[l.t], st = tr.appendChild(el("td", undefined, "st s-" + status));
    st.append(marks[status].cloneNode(true), " " + status);
    if (l.a) st.append(el("small", l.a[0]));
    const due = tr.appendChild(el("td", l.e || "", "day"));
    if (l.v > 0) due.append(el("small", l.v + (l.v === 1 ? " day over" : " days over")));
    tr.appendChild(el("td", subject(l))).append(el("small", W[l.s]));
    const what = tr.appendChild(el("td")), open = what.appendChild(el("button", D.duties[l.d].n, "open"));
    open.type = "button";
    open.setAttribute("aria-expanded", "false");
    open.addEventListener("click", () => {
      const was = open.getAttribute("aria-expanded") === "true";
      open.setAttribute("aria-expanded", String(!was));
      if (was) tr.nextSibling.remove(); else tr.after(details(l));
    });
    what.append(el("span", W[l.m], "msg"));
    const cite = tr.appendChild(el("td", W[l.c]));
    if (D.several) cite.append(el("small", W[l.b]));
    return tr;
  }
  const escaped = (id) => id.replaceAll("~", "~0").replaceAll("/", "~1");
  function details(l) {
    const tr = el("tr", undefined, "more"), td = tr.appendChild(el("td")), duty = D.duties[l.d], dl = td.appendChild(el("dl"));
    const say = (name, text, to = dl) => { if (text) to.append(el("dt", name), el("dd", text)); };
    td.colSpan = 5;
    say("What the law asks", duty.a); say("Paragraph", W[l.c]); say("What to do", W[l.r]); say("Due", l.e); say("Done", l.o); say("Severity", duty.s); say("Bundle", W[l.b]);
    if (l.a) { say("Employer", l.a[0]); say("Because", l.a[1]); say("Approved by", l.a[2]); }
    const link = el("a", l.i, "id");
    link.href = "#register?text=" + l.i;
    dl.append(el("dt", "Finding"), el("dd"));
    dl.lastChild.append(link);
    if (l.f || l.l || l.h) {
      td.append(el("h3", "How we know"));
      const how = td.appendChild(el("dl"));
      for (const flat of [l.f || [], l.h || []]) for (let i = 0; i < flat.length; i += 2) say(W[flat[i]], W[flat[i + 1]], how);
      for (let i = 0; l.l && i < l.l.length; i += 4) {
        const [name, value, cite, seen] = l.l.slice(i, i + 4).map((n) => W[n]);
        say(name, [value, cite, seen === "text" ? "" : "not read in the official text (" + seen + ")"].filter(Boolean).join(", "), how);
      }
    }
    if (l.w) {
      td.append(el("h3", "Records it rests on"));
      const ul = td.appendChild(el("ul"));
      for (let i = 0; i < l.w.length; i += 3) ul.append(el("li", [W[l.w[i]], W[l.w[i + 1]], l.w[i + 2] ? "row " + l.w[i + 2] : ""].filter(Boolean).join(", ")));
    }
    const of = by("of/" + escaped(W[l.s]) + "/" + W[l.k] + "/" + escaped(l.u));
    if (of) { const a = td.appendChild(el("p")).appendChild(el("a", "All of " + subject(l))); a.href = "#" + encodeURIComponent(of.id); }
    return tr;
  }

  // The form, the heads, the links.
  function options() {
    const words = { duty: new Map(D.duties.map((d) => [d.i, d.n])) };
    for (const f of FIELDS) {
      const seen = known[f] = new Map(), select = form.elements[f];
      for (const l of D.lines) { const v = get[f](l); seen.set(v, (seen.get(v) || 0) + 1); }
      const word = (k) => words[f]?.get(k) || k, keys = [...seen.keys()];
      if (f === "status") keys.sort((a, b) => D.statuses.indexOf(a) - D.statuses.indexOf(b)); else keys.sort((a, b) => collator.compare(word(a), word(b)));
      const option = (value, text) => { const o = el("option", text); o.value = value; return o; };
      select.replaceChildren(option("", "all"), ...keys.map((k) => option(k, word(k) + " (" + seen.get(k) + ")")));
      select.addEventListener("change", () => { set(f, select.value); go(true); });
    }
    form.elements.accepted.closest("label").hidden = !known.accepted.has("yes");
  }
  function toRegister() { by("register").scrollIntoView(); shown.tabIndex = -1; shown.focus({ preventScroll: true }); }
  function reveal() {
    const of = part() && by(part());
    if (of && of.tagName === "DETAILS") { of.open = true; of.scrollIntoView(); of.querySelector("summary").focus({ preventScroll: true }); }
  }
  function follow() { if (!read()) { reveal(); return; } if (address() !== applied) apply(); if (location.hash.includes("?")) by("register").scrollIntoView(); }
  let wait;
  form.elements.text.addEventListener("input", () => { clearTimeout(wait); wait = setTimeout(() => { set("text", form.elements.text.value.trim()); go(false); }, 60); });
  form.addEventListener("submit", (e) => e.preventDefault());
  form.addEventListener("reset", (e) => { e.preventDefault(); clearTimeout(wait); form.elements.text.value = ""; state = {}; go(true); });
  for (const th of document.querySelectorAll("th[data-sort]")) {
    const b = el("button", th.textContent), k = th.dataset.sort;
    b.type = "button";
    th.dataset.name = th.textContent; // in print
    th.replaceChildren(b);
    b.addEventListener("click", () => { state.sort = state.sort === k ? "-" + k : k; go(true); });
  }
  document.addEventListener("click", (e) => {
    const a = e.target.closest("a[href^='#']");
    if (!a || e.ctrlKey || e.metaKey || e.shiftKey) return;
    if (a.dataset.filter) {
      e.preventDefault();
      state = Object.fromEntries(new URLSearchParams(a.dataset.filter));
      go(true);
      toRegister();
    } else if (a.hash === location.hash) reveal();
  });
  more.addEventListener("click", () => { const from = count; count += PAGE; draw(); body.querySelectorAll(".open")[from]?.focus(); });

  // On paper subjects are open and the register is whole, as far as that stays within reason.
  let closed = [];
  addEventListener("beforeprint", () => {
    closed = [...document.querySelectorAll("details.subject:not([open])")].slice(0, OPENED);
    for (const d of closed) d.open = true;
    const old = count;
    count = PRINTED;
    draw();
    count = old;
    more.textContent = "The other " + (list.length - PRINTED) + " findings are not printed.";
  });
  addEventListener("afterprint", () => { for (const d of closed) d.open = false; draw(); });

  addEventListener("hashchange", follow);
  form.hidden = false;
  options();
  if (!read()) { apply(); addEventListener("load", () => setTimeout(reveal)); } // the browser takes the keyboard away while it loads
  follow();
  document.documentElement.dataset.ready = "yes";
})();
