# METADATA
# title: Shared helpers
# description: >-
#   The few words that the duties of all bundles have in common. They take what a duty hands them and answer with yes,
#   a day, a number or words, never with records: of what a shared rule returns, a misspelt fact is no compile error. They are called for every
#   subject and are written to be quick.
package common

import rego.v2

# The value of a parameter that is in force on a day, or null if none is. A value ends when the next one begins.
at(parameter, day) := latest.value if {
	begun := [period | some period in parameter.values; period.from <= day]
	latest := begun[count(begun) - 1]
	covers(latest, day)
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

# Whether one of the stretches runs today.
any_current(stretches) if stretches[_].current == true

# Since when that is so: the first day of the stretches that run today, or null if none does.
current_since(stretches) := day if {
	day := min([stretch.from | some stretch in stretches; stretch.current == true])
} else := null

# Why something is not known on a day: each reason once. A stretch without a reason counts with an empty one.
reasons(unknown, day) := sort({reason |
	some stretch in unknown
	covers(stretch, day)
	reason := concat("", [words | some words in [stretch.reason]; words != null])
})

# What documents say that they cover, all of them together.
covered(papers) := {word | some paper in papers; some word in paper.covers}

# Words of a list as they are read, such as "noise sources, work practices" of noise_sources and work_practices.
in_words(words) := replace(concat(", ", words), "_", " ")

# The references of those records that there are.
refs(links) := [ref | ref := links[_].ref; ref != null]

# What the records lack: the words, if the value is not known.
missing(value, words) := [words] if value == null

else := []
