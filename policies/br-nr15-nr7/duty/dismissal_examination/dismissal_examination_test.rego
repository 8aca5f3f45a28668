package duty.dismissal_examination_test

import data.duty.dismissal_examination as duty
import rego.v2

departure(age, after) := {
	"from": "2022-02-01", "last": "2025-03-31", "test_age_days": null, "appointment_age_days": age,
	"test_after": null, "appointment_after": after,
}

value(n) := {"values": [{"from": "2022-01-03", "to": null, "value": n}]}

parameters := {"exit_clinical_age_low": value(135), "exit_clinical_age_high": value(90)}

worker(degree, departures) := {"choices": {"risk_degree": degree}, "departures": departures, "enrolled": [{"from": "2022-06-01", "to": "2023-01-01"}]}

obligation(w) := o if some o in duty.obligations with input as w with data.parameters as parameters

reasons(w) := found if found := duty.not_owed with input as w with data.parameters as parameters

test_waived_below_the_age if {
	obligation(worker("3-4", [departure(89, null)])).lifted == "the latest clinical examination is 89 days old on the last day of the contract"
	obligation(worker("1-2", [departure(134, null)])).cite == "NR-7 7.5.11"
}

test_not_waived_at_the_age if {
	obligation(worker("3-4", [departure(90, null)])).within == "exit_clinical_time"
	obligation(worker("1-2", [departure(135, null)])).after == "2025-03-31"
	obligation(worker("3-4", [departure(null, null)])).by == null
}

test_made_afterwards if {
	link := {"date": "2025-04-10", "ref": "examination/e1"}
	obligation(worker("3-4", [departure(null, link)])).by == link
}

test_never_above_the_action_level_in_that_employment if {
	every enrolled in [[], [{"from": "2020-01-01", "to": "2022-02-01"}], [{"from": "2025-04-01", "to": null}]] {
		quiet := object.union(worker("3-4", [departure(null, null)]), {"enrolled": enrolled})
		not obligation(quiet)
		count(reasons(quiet)) == 1
	}
}

test_no_contract_ends if {
	not obligation(worker("3-4", []))
	count(reasons(worker("3-4", []))) == 1
	old := object.union(departure(null, null), {"last": "2022-01-02"})
	not obligation(worker("3-4", [old]))
	count(reasons(worker("3-4", [old]))) == 1
}
