package dossier

// SetBudget sets the number of bytes of packed records that stay in memory.
func (s *Store) SetBudget(bytes int) { s.budget = bytes }

// Spilled gives the number of bytes that were moved to the temporary file.
func (s *Store) Spilled() int64 { return s.spilled }

// ObservationTexts gives the sentences of the kinds that are not of single thresholds.
func ObservationTexts() (out []string) {
	for _, k := range ownKinds {
		out = append(out, k.text)
	}
	return out
}
