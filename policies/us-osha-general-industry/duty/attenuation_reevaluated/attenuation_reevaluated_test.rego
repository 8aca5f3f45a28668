package duty.attenuation_reevaluated_test

import data.duty.attenuation_reevaluated
import rego.v2

evaluated := {"date": "2024-06-20", "ref": "document/attenuation_evaluation@2024-06-20"}

change(raises, enrolling, evaluation) := {
	"id": "c1", "ref": "change/c1", "date": "2024-06-01", "what": "a second press",
	"raises_exposure": raises, "enrolling": enrolling, "evaluated": evaluation,
}

group(holders, changes) := {"protector_holders": holders, "changes": changes}

test_not_evaluated_since if {
	dossier := group(8, [change("yes", true, null)])
	some o in attenuation_reevaluated.obligations with input as dossier
	o.by == null
	o.after == "2024-06-01"
	o.facts.workers_with_protectors == 8
	count(attenuation_reevaluated.not_owed) == 0 with input as dossier
}

test_evaluated_since if {
	some o in attenuation_reevaluated.obligations with input as group(8, [change("yes", true, evaluated)])
	o.by == evaluated
}

test_no_change_that_matters if {
	every dossier in [
		group(8, []),
		group(8, [change("no", true, null)]),
		group(8, [change(null, true, null)]),
		group(8, [change("yes", false, null)]),
		group(0, [change("yes", true, null)]),
	] {
		count(attenuation_reevaluated.obligations) == 0 with input as dossier
		count(attenuation_reevaluated.not_owed) == 1 with input as dossier
	}
}
