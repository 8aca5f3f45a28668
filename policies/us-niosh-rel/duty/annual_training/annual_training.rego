# METADATA
# title: Annual training (recommended)
# description: >-
#   Every worker at or above the REL is trained at least once a year. Annually is read as within twelve months of the
#   training before, or of the first day at or above the REL.
# custom:
#   cite: NIOSH 98-126, 1.8 (from memory)
#   subject: worker
#   topic: training
#   severity: minor
#   evidence: [training]
#   remedy: >-
#     Train the worker now, on all topics, and keep a record of the day and the topics.
package duty.annual_training

import rego.v2

obligations contains {"every": "training_interval", "during": stretch, "by": "training.any"} if some stretch in in_program

in_program := [{"from": stretch.from, "to": stretch.to} | some stretch in input.enrolled]

not_owed contains "no stretch at or above the REL is known" if count(input.enrolled) == 0
