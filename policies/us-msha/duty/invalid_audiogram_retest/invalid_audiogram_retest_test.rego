package duty.invalid_audiogram_retest_test

import data.duty.invalid_audiogram_retest
import rego.v2

done(kind, result, day) := {"date": day, "ref": sprintf("follow_up/%s", [day]), "kind": kind, "result": result}

determined := done("invalidated", null, "2024-03-20")

invalid := {
	"id": "a2",
	"ref": "audiogram/a2",
	"date": "2024-03-05",
	"purpose": "periodic",
	"enrolled": true,
	"invalidated": true,
	"ears_with_result": 2,
	"follow_ups": [determined],
}

retest := {
	"id": "a3",
	"ref": "audiogram/a3",
	"date": "2024-04-10",
	"purpose": "retest",
	"enrolled": true,
	"invalidated": false,
	"ears_with_result": 2,
	"follow_ups": [],
}

stretch := {"from": "2020-01-01", "to": null, "current": true}

worker(change, others) := {
	"enrolled": [stretch],
	"audiograms": array.concat([object.union(invalid, change)], others),
}

after(follow_ups) := worker({"follow_ups": array.concat([determined], follow_ups)}, [])

obligation(dossier) := only if {
	all := invalid_audiogram_retest.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_retested if {
	found := obligation(worker({}, [retest]))
	found.within == "retest_time"
	found.after == "2024-03-20"
	found.by == {"date": "2024-04-10", "ref": "audiogram/a3"}
	found.during == {"from": "2020-01-01", "to": null}
	found.because == ["audiogram/a2", "follow_up/2024-03-20"]
}

test_not_retested if {
	obligation(worker({}, [])).by == null
	obligation(worker({}, [object.union(retest, {"ears_with_result": 1})])).by == null
	obligation(worker({}, [object.union(retest, {"date": "2024-03-05"})])).by == null
}

test_determination_not_on_record if obligation(worker({"follow_ups": []}, [])).after == null

test_pathology_in_the_way if {
	obligation(after([done("medical_opinion", "retest_not_possible", "2024-03-25")])).cite == "30 CFR 62.172(b)(1)"
}

test_pathology_has_improved if {
	found := obligation(after([
		done("medical_opinion", "retest_not_possible", "2024-03-25"),
		done("medical_opinion", "retest_possible", "2024-05-02"),
	]))
	found.after == "2024-05-02"
	found.within == "retest_time"
}

test_referred_and_nobody_has_said if {
	every follow_up in [done("referral_decision", "referral_needed", "2024-03-25"), done("referral", null, "2024-03-25")] {
		found := obligation(after([follow_up]))
		found.by == null
		found.because == ["audiogram/a2", "follow_up/2024-03-25"]
	}
}

test_baseline_that_failed_before_the_program if {
	obligation(worker({"enrolled": false, "purpose": "baseline", "date": "2019-12-01"}, [])).during == null
}

test_nothing_invalid if {
	every dossier in [
		{"enrolled": [stretch], "audiograms": [retest]},
		{"enrolled": [], "audiograms": [object.union(invalid, {"enrolled": false, "purpose": "baseline"})]},
		worker({"enrolled": false}, []),
	] {
		invalid_audiogram_retest.obligations == set() with input as dossier
		count(invalid_audiogram_retest.not_owed) == 1 with input as dossier
	}
	count(invalid_audiogram_retest.not_owed) == 0 with input as worker({}, [])
}
