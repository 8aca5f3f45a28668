package duty.sensitive_workers_test

import data.duty.sensitive_workers
import rego.v2

site(ever, documents) := {"enrolled_ever": ever, "enrolled_now": ever, "documents": documents}

paper(day) := {"kind": "sensitive_workers", "date": day, "ref": sprintf("document/%s", [day])}

test_nobody_has_answered if {
	some o in sensitive_workers.obligations with input as site(4, [])
	o.by == null
	count(sensitive_workers.not_owed) == 0 with input as site(4, [])
}

test_the_latest_answer_counts if {
	some o in sensitive_workers.obligations with input as site(4, [paper("2023-02-01"), paper("2024-05-02"), {"kind": "advice", "date": "2025-01-01", "ref": "document/x"}])
	o.by == {"date": "2024-05-02", "ref": "document/2024-05-02"}
}

test_nobody_in_noise if {
	found := sensitive_workers.obligations with input as site(0, [paper("2024-05-02")])
	count(found) == 0
	count(sensitive_workers.not_owed) == 1 with input as site(0, [])
}
