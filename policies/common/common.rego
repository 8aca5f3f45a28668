# METADATA
# title: Shared helpers
# description: The few words that the duties of all bundles have in common.
package common

import rego.v2

# The value of a parameter that is in force on a day, or null if none is.
at(parameter, day) := period.value if {
	some period in parameter.values
	covers(period, day)
} else := null

# Whether a stretch holds a day: from its first day up to, but without, the day in `to`. Without `to` it is open.
covers(stretch, day) if {
	stretch.from <= day
	not over(stretch, day)
}

over(stretch, day) if {
	stretch.to != null
	stretch.to <= day
}

# The references of those records that there are.
refs(links) := [link.ref | some link in links; link != null]

# What the records lack: the words, if the value is not known.
missing(value, words) := [words] if value == null

else := []
