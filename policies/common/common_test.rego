package common.at_test

import data.common
import rego.v2

one_value := {"values": [{"from": "1983-04-07", "value": 85}]}

changed := {"values": [
	{"from": "2000-01-01", "to": "2010-01-01", "value": 90},
	{"from": "2010-01-01", "to": null, "value": 85},
]}

with_pause := {"values": [
	{"from": "2000-01-01", "to": "2005-01-01", "value": 1},
	{"from": "2008-01-01", "value": 2},
]}

test_first_day if common.at(one_value, "1983-04-07") == 85

test_day_before_first if common.at(one_value, "1983-04-06") == null

test_long_after if common.at(one_value, "2026-06-30") == 85

test_last_day_of_old_value if common.at(changed, "2009-12-31") == 90

test_first_day_of_new_value if common.at(changed, "2010-01-01") == 85

test_pause_has_no_value if common.at(with_pause, "2006-07-01") == null

test_unknown_day_has_no_value if common.at(one_value, null) == null

test_value_may_be_an_interval if {
	common.at({"values": [{"from": "1983-04-07", "value": {"months": 12}}]}, "2020-01-01") == {"months": 12}
}

test_open_stretch_covers if common.covers({"from": "2024-01-01", "to": null}, "2026-06-30")

test_stretch_ends_before_its_last_date if {
	not common.covers({"from": "2024-01-01", "to": "2026-06-30"}, "2026-06-30")
	common.covers({"from": "2024-01-01", "to": "2026-07-01"}, "2026-06-30")
}

test_stretch_of_the_future_does_not_cover if not common.covers({"from": "2026-07-01", "to": null}, "2026-06-30")

test_refs_leave_out_what_there_is_not if {
	common.refs([null, {"date": "2024-01-01", "ref": "audiogram/a1"}]) == ["audiogram/a1"]
	common.refs([null]) == []
	common.refs([{"date": "2024-01-01", "ref": null}]) == []
}

test_missing_only_if_null if {
	common.missing(null, "the level") == ["the level"]
	common.missing(0, "the level") == []
	common.missing(false, "the level") == []
}

test_value_ends_when_the_next_begins if {
	open_ended := {"values": [{"from": "1983-04-07", "value": 90}, {"from": "2010-01-01", "to": "2020-01-01", "value": 85}]}
	common.at(open_ended, "2009-12-31") == 90
	common.at(open_ended, "2010-01-01") == 85
	common.at(open_ended, "2020-01-01") == null
}

past := {"from": "2019-01-01", "to": "2020-01-01", "current": false}

since_2022 := {"from": "2022-03-01", "to": null, "current": true}

since_2024 := {"from": "2024-05-01", "to": null, "current": true}

test_one_that_runs_today_is_enough if common.any_current([past, since_2022])

test_none_runs_today if {
	not common.any_current([past])
	not common.any_current([])
}

test_since_when_the_first_of_those_runs if common.current_since([since_2024, past, since_2022]) == "2022-03-01"

test_since_when_of_none_is_not_known if {
	common.current_since([past]) == null
	common.current_since([]) == null
}

open_until_2024 := {"from": "2020-01-01", "to": "2024-01-01", "reason": "never measured"}

test_reasons_of_the_day if {
	common.reasons([open_until_2024], "2023-12-31") == ["never measured"]
	common.reasons([open_until_2024], "2024-01-01") == []
}

test_each_reason_once if {
	other := {"from": "2020-01-01", "to": null, "reason": "a change was not measured"}
	common.reasons([open_until_2024, other, open_until_2024], "2023-01-01") == ["a change was not measured", "never measured"]
}

test_a_missing_reason_counts if {
	common.reasons([{"from": "2020-01-01", "to": null, "reason": null}], "2023-01-01") == [""]
}

test_covered_by_all_papers_together if {
	common.covered([{"covers": ["peak"]}, {"covers": []}, {"covers": ["level", "peak"]}]) == {"level", "peak"}
	common.covered([]) == set()
}

test_words_as_they_are_read if {
	common.in_words(["noise_sources", "work_practices"]) == "noise sources, work practices"
	common.in_words({"noise_sources"}) == "noise sources"
	common.in_words([]) == ""
}
