package audiometry

import "fmt"

// SumTable is a table of warning and referral values for the sum of hearing levels by age and sex, as
// guidance on health surveillance prints it. The values are data of a bundle; none stand here.
type SumTable struct {
	Frequencies []int    `json:"frequencies" doc:"frequencies that are summed, Hz"`
	Rows        []SumRow `json:"rows" doc:"values by sex and age"`
}

// SumRow is one row of a SumTable.
type SumRow struct {
	Sex      string `json:"sex" enum:"female|male" doc:"sex"`
	FromAge  int    `json:"from_age" doc:"first age, completed years"`
	ToAge    int    `json:"to_age,omitempty" doc:"last age, completed years; no end if left out"`
	Warning  int    `json:"warning" doc:"sum from which a warning is due, dB"`
	Referral int    `json:"referral" doc:"sum from which a referral is due, dB"`
}

// SumOutcome is what a SumTable says of one ear.
type SumOutcome struct {
	Sum      Sum     // sum of the hearing levels
	Row      SumRow  // the row that applies
	Warning  Verdict // whether the sum is the warning value or more
	Referral Verdict // whether it is the referral value or more
}

// Row gives the row for a sex and an age in completed years. It fails if there is none, as for ages below
// the table.
func (t *SumTable) Row(sex string, age int) (SumRow, error) {
	for _, r := range t.Rows {
		if r.Sex == sex && age >= r.FromAge && (r.ToAge == 0 || age <= r.ToAge) {
			return r, nil
		}
	}
	return SumRow{}, fmt.Errorf("the table of sums has no values for the sex %q at %d years", sex, age)
}

// Judge holds one ear against the table. No response enters as a lower bound, so that a sum may be at the
// referral value for certain, or undecided; a missing frequency leaves both verdicts undecided. It fails as
// Row does.
func (t *SumTable) Judge(e *Ear, sex string, age int) (SumOutcome, error) {
	row, err := t.Row(sex, age)
	if err != nil {
		return SumOutcome{Warning: Undecided, Referral: Undecided}, err
	}
	sum := e.Sum(t.Frequencies)
	return SumOutcome{
		Sum: sum, Row: row,
		Warning: sum.TotalReaches(float64(row.Warning)), Referral: sum.TotalReaches(float64(row.Referral)),
	}, nil
}
