package duty.damage_examined_test

import data.duty.damage_examined as duty
import rego.v2

now := {"from": "2020-01-01", "to": null, "current": true}

past := {"from": "2020-01-01", "to": "2021-01-01", "current": false}

open := {"from": "2024-01-01", "to": null, "reason": "not measured"}

obligation(dossier) := only if {
	all := duty.obligations with input as dossier
	some only in all
	count(all) == 1
}

quiet(dossier) if {
	count(duty.obligations) == 0 with input as dossier
	count(duty.not_owed) == 1 with input as dossier
}

act(kind, by) := {"date": "2025-03-01", "ref": sprintf("follow_up/%s", [kind]), "kind": kind, "by_is": by, "result": null, "ear": null}

found_by(by, acts) := {
	"attended_on": "2025-02-01", "ref": "examination/e1", "damage": true, "by_is": by, "follow_ups": acts,
}

worker(examinations, audiograms) := {"examinations": examinations, "audiograms": audiograms}

test_not_examined if {
	found := obligation(worker([found_by("technician", [])], []))
	found.holds == false
	found.key == "2025-02-01"
	found.because == ["examination/e1"]
	obligation(worker([found_by("technician", [act("worker_informed", "physician")])], [])).holds == false
}

test_examined_by_a_doctor if {
	found := obligation(worker([found_by("technician", [act("damage_examined", "physician")])], []))
	found.holds == true
	found.because == ["examination/e1", "follow_up/damage_examined"]
	obligation(worker([found_by(null, [act("damage_opinion", "otolaryngologist")])], [])).holds == true
	obligation(worker([found_by("physician", [])], [])).holds == true
}

test_examined_by_somebody if {
	found := obligation(worker([found_by("technician", [act("damage_examined", null)])], []))
	found.holds == null
	found.missing == ["the profession of the examiner"]
	obligation(worker([found_by(null, [])], [])).note == "the worker was examined on 2025-02-01, and it is not known by whom"
}

test_examined_by_another_profession if {
	obligation(worker([found_by("technician", [act("damage_examined", "technician")])], [])).holds == false
}

test_found_in_an_audiogram if {
	audiogram := {"date": "2025-02-01", "ref": "audiogram/a1", "follow_ups": [act("damage_found", "technician"), act("damage_examined", "physician")]}
	obligation(worker([], [audiogram])).because == ["follow_up/damage_found", "follow_up/damage_examined"]
	obligation(worker([], [object.union(audiogram, {"follow_ups": [act("damage_found", null)]})])).holds == false
}

test_what_was_done_before_does_not_count if {
	before := object.union(act("damage_examined", "physician"), {"date": "2025-01-31"})
	obligation(worker([found_by("technician", [before])], [])).holds == false
}

test_opinions_are_those_of_doctors if {
	w := worker([found_by(null, [act("damage_opinion", "physician"), act("damage_examined", "physician")])], [])
	[o.ref | some o in duty.opinions(duty.damages[0])] == ["follow_up/damage_opinion"] with input as w
	by_nurse := worker([found_by(null, [act("damage_opinion", "licensed_professional")])], [])
	duty.opinions(duty.damages[0]) == [] with input as by_nurse
}

test_found_again if {
	first := found_by("technician", [])
	again := object.union(first, {"attended_on": "2025-06-01", "ref": "examination/e2"})
	obligation(worker([first, again], [])).key == "2025-02-01"
	obligation(worker([first, object.union(first, {"ref": "examination/e2"})], [])).because == ["examination/e1"]
	examined := object.union(first, {"follow_ups": [act("damage_examined", "physician")]})
	found := {o.key: o.holds | some o in duty.obligations} with input as worker([examined, again], [])
	found == {"2025-02-01": true, "2025-06-01": false}
}

test_no_damage if {
	quiet(worker([], []))
	quiet(worker([object.union(found_by(null, []), {"damage": false})], []))
	quiet(worker([object.union(found_by(null, []), {"attended_on": null})], []))
}
