package duty.clinical_referral_test

import data.duty.clinical_referral
import rego.v2

done(kind, result, by) := {"date": "2024-03-20", "ref": "follow_up/1", "kind": kind, "result": result, "by_is": by}

invalid(follow_ups) := {
	"id": "a2",
	"ref": "audiogram/a2",
	"date": "2024-03-05",
	"enrolled": true,
	"invalidated": true,
	"ears_with_result": 2,
	"follow_ups": follow_ups,
}

valid := {"id": "a3", "ref": "audiogram/a3", "date": "2024-04-10", "enrolled": true, "invalidated": false, "ears_with_result": 2, "follow_ups": []}

worker(tests) := {"audiograms": tests}

obligation(dossier) := only if {
	all := clinical_referral.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_nobody_has_decided if {
	every follow_ups in [[], [done("invalidated", null, "audiologist")], [done("referral_decision", "referral_needed", "technician")], [done("referral_decision", null, "physician")]] {
		found := obligation(worker([invalid(follow_ups)]))
		found.of == "physician or audiologist"
		found.by == null
	}
}

test_needed_and_not_made if {
	found := obligation(worker([invalid([done("referral_decision", "referral_needed", "audiologist")])]))
	found.after == "2024-03-20"
	found.by == null
}

test_referred if {
	obligation(worker([invalid([done("referral_decision", "referral_needed", "audiologist"), done("referral", null, "audiologist")])])).holds == true
	obligation(worker([invalid([done("referral", null, null)])])).because == ["audiogram/a2", "follow_up/1"]
}

test_not_needed if obligation(worker([invalid([done("referral_decision", "no_referral_needed", "physician")])])).holds == true

test_valid_audiogram_since if {
	settled := worker([invalid([]), valid])
	clinical_referral.obligations == set() with input as settled
	count(clinical_referral.not_owed) == 1 with input as settled
	obligation(worker([invalid([done("referral_decision", "referral_needed", "physician")]), valid])).by == null
}

test_another_invalid_audiogram_settles_nothing if {
	again := object.union(invalid([done("referral", null, "physician")]), {"id": "a3", "date": "2024-04-10"})
	{o.key | some o in clinical_referral.obligations} == {"a2", "a3"} with input as worker([invalid([]), again])
}

test_test_of_one_ear_settles_nothing if {
	obligation(worker([invalid([]), object.union(valid, {"ears_with_result": 1})])).of == "physician or audiologist"
}

test_nothing_invalid if {
	every tests in [[], [valid], [object.union(invalid([]), {"enrolled": false})]] {
		clinical_referral.obligations == set() with input as worker(tests)
		count(clinical_referral.not_owed) == 1 with input as worker(tests)
	}
	count(clinical_referral.not_owed) == 0 with input as worker([invalid([])])
}
