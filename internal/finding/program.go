package finding

// OfProgram stands in place of a bundle where a finding is about the program's own papers, such as an accepted
// gap whose time is over, and not about a law.
const OfProgram = "program"
