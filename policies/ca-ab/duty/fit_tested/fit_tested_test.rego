package duty.fit_tested_test

import data.duty.fit_tested
import rego.v2

worker(day, test, failed) := {
	"as_of": day, "exposed": {"protectors": [{"from": "2020-01-01", "to": null, "current": true}]},
	"protection": {"date": "2023-01-01", "ref": "protector_issue/p", "protector": "p", "par_db": null, "fit_test": test, "fit_failed": failed},
}

link := {"date": "2023-04-03", "ref": "fit_test/f"}

holds(dossier) := found if found := {o.holds | some o in fit_tested.obligations} with input as dossier

test_not_tested if {
	holds(worker("2023-03-31", null, null)) == {false}
	count(fit_tested.not_owed) == 0 with input as worker("2023-03-31", null, null)
}

test_tested if {
	holds(worker("2023-05-01", link, null)) == {true}
	holds(worker("2023-05-01", link, link)) == {false}
	{o.because | some o in fit_tested.obligations} == {["protector_issue/p", "fit_test/f"]} with input as worker("2023-05-01", link, null)
}

test_not_owed if {
	every dossier in [
		worker("2023-03-30", null, null), object.union(worker("2023-03-31", null, null), {"exposed": {"protectors": []}}),
		{"as_of": "2023-03-31", "protection": null, "exposed": {"protectors": [{"from": "2020-01-01", "to": null, "current": true}]}},
	] {
		holds(dossier) == set()
		count(fit_tested.not_owed) == 1 with input as dossier
	}
}
