package duty.log_retention_test

import data.duty.log_retention
import rego.v2

year(kept) := {"year": "2023", "latest": {"date": "2023-09-01", "ref": "follow_up/log_entry"}, "entries": 2, "kept": kept}

obligation(years) := o if some o in log_retention.obligations with input as {"log_years": years}

test_not_kept if {
	obligation([year(null)]).holds == false
	obligation([year(null)]).key == "2023"
	obligation([year(null)]).facts.hearing_losses_in_log == 2
}

test_kept if obligation([year({"date": "2024-01-15", "ref": "document/injury_log"})]).holds == true

test_only_for_five_years_after if {
	obligation([year(null)]).for == "log_retention"
	obligation([year(null)]).on == "2023-09-01"
}

test_no_hearing_loss_in_the_log if {
	not obligation([])
	count(log_retention.not_owed) == 1 with input as {"log_years": []}
	count(log_retention.not_owed) == 0 with input as {"log_years": [year(null)]}
}
