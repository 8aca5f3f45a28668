package duty.protector_changed_test

import data.duty.protector_changed
import rego.v2

done(kind) := {"date": "2024-03-05", "ref": "follow_up/1", "kind": kind, "result": null}

worker(after_tests, after_examinations) := {
	"audiograms": [{"id": "a1", "follow_ups": after_tests}],
	"examinations": [{"id": "e1", "follow_ups": after_examinations}],
}

test_cannot_wear_it if {
	every dossier in [worker([done("protector_unsuitable")], []), worker([], [done("protector_unsuitable")])] {
		some o in protector_changed.obligations with input as dossier
		o.after == "2024-03-05"
		o.by == "protector.issue"
		o.because == ["follow_up/1"]
	}
}

test_said_of_two_tests_it_is_one_matter if {
	count(protector_changed.obligations) == 1 with input as worker([done("protector_unsuitable")], [done("protector_unsuitable")])
}

test_nothing_prevents_it if {
	count(protector_changed.obligations) == 0 with input as worker([done("referral")], [])
	count(protector_changed.not_owed) == 1 with input as worker([done("referral")], [])
	count(protector_changed.not_owed) == 1 with input as {"audiograms": [], "examinations": []}
	count(protector_changed.not_owed) == 0 with input as worker([done("protector_unsuitable")], [])
}
