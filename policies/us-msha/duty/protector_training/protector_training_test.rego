package duty.protector_training_test

import data.duty.protector_training
import rego.v2

issue := {"date": "2024-01-10", "ref": "protector_issue/P1"}

session := {"date": "2024-01-11", "ref": "training/w1@2024-01-11", "topics": [], "topics_unrecorded": false}

worker(general, particular) := {
	"enrolled": [{"from": "2024-01-01", "to": null, "current": true}], "protection": issue,
	"training": general, "protector_training": particular,
}

holds(dossier) := found if found := {o.holds | some o in protector_training.obligations} with input as dossier

reasons(dossier) := found if found := protector_training.not_owed with input as dossier

test_trained if {
	holds(worker(session, session)) == {true}
	count(reasons(worker(session, session))) == 0
}

test_never_trained if holds(worker(null, null)) == {false}

test_trained_in_other_things if holds(worker(session, null)) == {false}

test_topics_not_recorded if holds(worker(object.union(session, {"topics_unrecorded": true}), null)) == {null}

test_no_protector if {
	dossier := object.union(worker(null, null), {"protection": null})
	holds(dossier) == set()
	count(reasons(dossier)) == 1
}

test_not_in_the_program_now if {
	dossier := object.union(worker(null, null), {"enrolled": [{"from": "2024-01-01", "to": "2025-01-01", "current": false}]})
	holds(dossier) == set()
	count(reasons(dossier)) == 1
}
