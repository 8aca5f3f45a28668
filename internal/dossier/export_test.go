package dossier

// SetBudget sets the number of bytes of packed records that stay in memory.
func (s *Store) SetBudget(bytes int) { s.budget = bytes }

// Spilled gives the number of bytes that were moved to the temporary file.
func (s *Store) Spilled() int64 { return s.spilled }
