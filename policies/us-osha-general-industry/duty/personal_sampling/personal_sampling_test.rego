package duty.personal_sampling_test

import data.duty.personal_sampling
import rego.v2

area := {"kind": "area", "ref": "measurement/a1"}

task := {"kind": "task", "ref": "measurement/t1"}

personal := {"kind": "personal", "ref": "measurement/p1"}

group(varied, measurements) := {"varied": varied, "measurements": measurements, "documents": [], "workers": 12}

with_paper(dossier) := object.union(dossier, {"documents": [{"kind": "area_sampling_equivalent", "ref": "document/d1"}]})

found(dossier) := results if results := {object.get(o, "holds", "lifted") | some o in personal_sampling.obligations} with input as dossier

reasons(dossier) := found if found := personal_sampling.not_owed with input as dossier

test_area_alone_where_unsuitable if {
	found(group(true, [area])) == {false}
	count(reasons(group(true, [area]))) == 0
}

test_one_personal_sample_is_enough if {
	some o in personal_sampling.obligations with input as group(true, [area, personal])
	o.holds == true
	o.because == ["measurement/p1"]
}

test_area_alone_where_suitable if found(group(false, [area, task])) == {true}

test_paper_shows_equivalence if {
	found(with_paper(group(true, [area]))) == {"lifted"}
	found(with_paper(group(true, [area, task]))) == {"lifted"}
	found(with_paper(group(null, [area]))) == {"lifted"}
}

test_paper_is_not_needed_where_area_sampling_suits if found(with_paper(group(false, [area]))) == {true}

test_nobody_has_said_whether_it_suits if found(group(null, [area])) == {null}

test_tasks_may_have_been_sampled_on_the_worker if found(group(true, [area, task])) == {null}

test_never_measured if {
	found(group(true, [])) == set()
	count(reasons(group(true, []))) == 1
}
