package duty.baseline_audiogram_test

import data.duty.baseline_audiogram
import rego.v2

stretch := {
	"from": "2023-08-31",
	"to": null,
	"current": true,
	"baseline": null,
	"baseline_mobile": null,
	"tested": null,
}

tested := {"baseline": {"date": "2024-02-29", "ref": "audiogram/a1"}, "baseline_mobile": false}

offer(answer, day) := {
	"kind": "hearing_test",
	"ref": "examination/e1",
	"answer": answer,
	"offered_on": day,
	"attended_on": null,
}

worker(change, van, offers) := {
	"choices": {"mobile_test_van": van},
	"enrolled": [object.union(stretch, change)],
	"exposures": [
		{"from": "2020-01-01", "ref": "measurement/quiet"},
		{"from": "2023-08-31", "ref": "measurement/loud"},
	],
	"examinations": offers,
}

obligation(dossier) := only if {
	all := baseline_audiogram.obligations with input as dossier
	some only in all
	count(all) == 1
}

test_no_baseline if {
	every offers in [[], [offer("accepted", "2023-10-01")], [offer("no_answer", "2023-10-01")], [offer("declined", "2022-01-01")]] {
		found := obligation(worker({}, false, offers))
		found.within == "baseline_time"
		found.after == "2023-08-31"
		found.by == null
		found.because == ["measurement/loud"]
	}
}

test_baseline_on_record if {
	found := obligation(worker(tested, false, []))
	found.by == {"date": "2024-02-29", "ref": "audiogram/a1"}
	found.within == "baseline_time"
}

test_van_gives_more_time if {
	obligation(worker({}, true, [])).within == "baseline_time_mobile"
	obligation(worker(object.union(tested, {"baseline_mobile": true}), false, [])).within == "baseline_time_mobile"
	obligation(worker(tested, true, [])).within == "baseline_time"
}

test_declined if {
	found := obligation(worker({}, false, [offer("declined", "2023-10-01")]))
	found.lifted == "the miner declined the test that was offered on 2023-10-01"
	found.because == ["examination/e1"]
	obligation(worker(tested, false, [offer("declined", "2023-10-01")])).lifted != ""
}

test_declined_after_the_baseline_is_another_test if {
	obligation(worker(tested, false, [offer("declined", "2025-02-01")])).by.ref == "audiogram/a1"
}

test_answer_not_recorded if {
	found := obligation(worker({}, false, [offer(null, "2023-10-01")]))
	found.holds == null
	found.missing == ["the miner's answer to the offer"]
	obligation(worker(tested, false, [offer(null, "2023-10-01")])).by.ref == "audiogram/a1"
}

test_declined_counts_more_than_an_open_answer if {
	obligation(worker({}, false, [offer("declined", "2023-10-01"), offer(null, "2023-11-01")])).lifted != ""
}

test_offer_of_something_else if {
	appointment := object.union(offer("declined", "2023-10-01"), {"kind": "health_appointment"})
	attended := object.union(offer("declined", "2023-10-01"), {"attended_on": "2023-11-01"})
	undated := offer("declined", null)
	every other in [appointment, attended, undated] {
		obligation(worker({}, false, [other])).by == null
	}
}

test_never_exposed if {
	quiet := {"choices": {"mobile_test_van": false}, "enrolled": [], "exposures": [], "examinations": []}
	baseline_audiogram.obligations == set() with input as quiet
	count(baseline_audiogram.not_owed) == 1 with input as quiet
	count(baseline_audiogram.not_owed) == 0 with input as worker({}, false, [])
}
