package duty.calculator_used_test

import data.duty.calculator_used
import rego.v2

schedule(covers) := {"kind": "schedule", "date": "2024-03-01", "ref": "document/s", "covers": covers}

print(day) := {"kind": "calculator", "date": day, "ref": "document/p", "covers": []}

holds(papers) := found if found := {o.holds | some o in calculator_used.obligations} with input as {"documents": papers}

test_several_tasks if {
	holds([schedule(["saw", "press"])]) == {false}
	holds([schedule(["saw", "press"]), print("2024-02-29")]) == {false}
	holds([schedule(["saw", "press"]), print("2024-03-01")]) == {true}
	count(calculator_used.not_owed) == 0 with input as {"documents": [schedule(["saw", "press"])]}
}

test_tasks_not_recorded if {
	holds([schedule([])]) == {null}
	holds([schedule([]), print("2024-03-01")]) == {true}
}

test_not_owed if {
	every papers in [[schedule(["saw"])], [object.union(schedule(["saw", "press"]), {"date": "2023-06-15"})], [object.union(schedule([]), {"kind": "advice"})]] {
		holds(papers) == set()
		count(calculator_used.not_owed) == 1 with input as {"documents": papers}
	}
}
