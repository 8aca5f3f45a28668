# METADATA
# title: Class or grade of the protector
# description: >-
#   The protector is of the class or grade that Table 2 of Schedule 3 gives for the worker's Lex: up to 90 dBA class
#   C, B or A, up to 95 dBA B or A, up to 100 dBA A or grade 3 or 4, up to 105 dBA A or grade 4, above that a plug and
#   a muff together, above 110 dBA with limited time as well. All from memory. Of two protectors only the kinds are
#   looked at.
# custom:
#   cite: OHS Code, Schedule 3, Table 2
#   subject: worker
#   topic: protectors
#   severity: minor
#   evidence: [protector, protector_issue, measurement]
#   remedy: Give the worker a protector of the class or grade in the table, and record its class.
package duty.protector_class

import data.common
import rego.v2

obligations contains {
	"key": "class",
	"holds": suitable,
	"note": said[suitable],
	"missing": missing_words,
	"because": [input.protection.ref],
	"facts": {"lex_dba": level, "class": input.protection.class, "accepted": accepted},
} if {
	concerned
	not two_needed
}

obligations contains {
	"key": "two protectors",
	"holds": plug_and_muff,
	"note": sprintf("Lex is %v dBA, for which the table asks for a plug and a muff together", [level]),
	"because": [input.protection.ref],
	"facts": {"lex_dba": level, "types": input.protection.types},
} if {
	concerned
	two_needed
}

obligations contains {
	"key": "limited time",
	"ask": "Is the time in this noise limited so that the ear receives less than the limit?",
	"of": "occupational hygienist",
	"by": null,
	"because": [input.protection.ref],
	"facts": {"lex_dba": level},
} if {
	concerned
	level > common.at(data.parameters.class_level_5, input.as_of)
}

not_owed contains "the worker is not above the level of protectors now, or has none, which is a finding of its own" if not concerned

concerned if {
	input.protection != null
	common.any_current(input.exposed.protectors)
}

# The highest that the exposure can be today.
default level := null

level := max([exposure.channels.day.at_most |
	some exposure in input.exposures
	common.covers(exposure, input.as_of)
	exposure.channels.day.at_most != null
])

rows := [
	{"up_to": common.at(data.parameters.class_level_1, input.as_of), "classes": common.at(data.parameters.classes_1, input.as_of)},
	{"up_to": common.at(data.parameters.class_level_2, input.as_of), "classes": common.at(data.parameters.classes_2, input.as_of)},
	{"up_to": common.at(data.parameters.class_level_3, input.as_of), "classes": common.at(data.parameters.classes_3, input.as_of)},
	{"up_to": common.at(data.parameters.class_level_4, input.as_of), "classes": common.at(data.parameters.classes_4, input.as_of)},
]

fitting := [row | some row in rows; level != null; level <= row.up_to]

two_needed if {
	level != null
	count(fitting) == 0
}

default accepted := null

accepted := fitting[0].classes

suitable := null if {
	count(missing_words) > 0
} else if {
	input.protection.class in accepted
} else := false

missing_words := array.concat(
	common.missing(level, "the worker's Lex"),
	common.missing(input.protection.class, "the class or grade of the protector"),
)

said := {
	true: null,
	false: "the protector is not of a class or grade that the table gives for this exposure",
	null: "it cannot be said whether the protector is of a class or grade in the table",
}

default plug_and_muff := false

plug_and_muff if "dual" in input.protection.types

plug_and_muff if {
	some plug in input.protection.types
	plug in ["formable", "premolded", "custom"]
	some muff in input.protection.types
	muff in ["earmuff", "helmet_muff"]
}
