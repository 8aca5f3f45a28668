package duty.information_content_test

import data.duty.information_content
import rego.v2

worker(current, training) := {
	"as_of": "2026-06-30", "training": training,
	"exposed": {"lower_reached": [{"from": "2024-01-01", "to": null, "current": current}]},
}

session(topics) := {"date": "2024-01-08", "ref": "training/t1", "topics": topics, "topics_unrecorded": count(topics) == 0}

parameter := {"values": [{"from": "2006-02-15", "value": ["one", "two"]}]}

holds(dossier) := found if found := {o.holds | some o in information_content.obligations} with input as dossier with data.parameters.information_topics as parameter

test_all_covered if holds(worker(true, session(["two", "one", "three"]))) == {true}

test_a_topic_lacks if {
	some o in information_content.obligations with input as worker(true, session(["two"])) with data.parameters.information_topics as parameter
	o.holds == false
	o.facts.topics_not_covered == ["one"]
	o.note == "the training did not cover: one"
	count(information_content.not_owed) == 0 with input as worker(true, session(["two"]))
}

test_topics_not_recorded if {
	some o in information_content.obligations with input as worker(true, session([])) with data.parameters.information_topics as parameter
	o.holds == null
	count(o.missing) == 1
	contains(o.note, "does not say")
}

test_law_names_no_topics_on_that_day if holds(object.union(worker(true, session(["one"])), {"as_of": "2006-02-14"})) == {null}

test_never_trained if {
	holds(worker(true, null)) == set()
	count(information_content.not_owed) == 1 with input as worker(true, null)
}

test_not_exposed_now if {
	holds(worker(false, session(["one"]))) == set()
	count(information_content.not_owed) == 1 with input as worker(false, session(["one"]))
}
