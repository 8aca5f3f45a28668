# METADATA
# title: System of monitoring
# description: >-
#   The operator establishes a system of monitoring that evaluates each miner's noise exposure sufficiently to determine
#   continuing compliance with Part 62. The paragraph sets no interval.
# custom:
#   cite: 30 CFR 62.110(a)
#   subject: site
#   topic: monitoring
#   severity: major
#   evidence: [document]
#   remedy: >-
#     Write down how and when the exposure of each miner is evaluated, and keep the paper.
package duty.monitoring_system

import data.common
import rego.v2

obligations contains {"holds": true, "on": papers[0].date, "because": common.refs(papers)} if {
	affected
	count(papers) > 0
}

obligations contains {"holds": false, "note": "no paper describes the system of monitoring"} if {
	affected
	count(papers) == 0
}

not_owed contains "nobody works at the site now" if not affected

affected if input.workers > 0

papers := [paper | some paper in input.documents; paper.kind == "monitoring_system"]
