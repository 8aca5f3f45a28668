package acoustics

// ASNZSClass gives the class 1 to 5 of a protector with the sound level conversion slc80 in dB: 10 to 13 is
// class 1, 14 to 17 class 2, 18 to 21 class 3, 22 to 25 class 4, 26 and more class 5 (AS/NZS 1270, from
// memory). A value between whole numbers belongs to the class below. It returns false under 10 dB, which has
// no class.
func ASNZSClass(slc80 float64) (int, bool) {
	if !finite(slc80) || slc80 < 10 {
		return 0, false
	}
	return min(5, 1+int((slc80-10)/4)), true
}

// ASNZSClassNeeded gives the least class of a protector for a daily exposure level in dB(A): below 90 class 1,
// below 95 class 2, below 100 class 3, below 105 class 4, below 110 class 5 (AS/NZS 1269.3, from memory).
// From 110 dB on it gives 0: a specialist chooses by octave bands. It returns false if the level is not a
// finite number.
func ASNZSClassNeeded(lex float64) (int, bool) {
	switch {
	case !finite(lex):
		return 0, false
	case lex >= 110:
		return 0, true
	case lex < 90:
		return 1, true
	}
	return 2 + int((lex-90)/5), true
}

// CSAChoice is what a class table asks of protectors.
type CSAChoice struct {
	Classes     string // the classes allowed for one protector, or for the plug of two; such as "C, B or A"
	Grades      string // the grades allowed in their place
	MuffClasses string // the classes of the muff that is worn over the plug; empty = one protector is enough
	MuffGrades  string // the grades allowed in their place
	LimitedTime bool   // the time of exposure must be limited too
}

// CSAClassNeeded gives the classes and grades of protectors for a daily exposure level in dB(A) (CSA Z94.2 as
// in the Alberta Occupational Health and Safety Code, Schedule 3 Table 2, from memory). A level at a bound
// belongs to the lower row. It returns false if the level is not a finite number.
func CSAClassNeeded(lex float64) (CSAChoice, bool) {
	switch {
	case !finite(lex):
		return CSAChoice{}, false
	case lex <= 90:
		return CSAChoice{Classes: "C, B or A", Grades: "1, 2, 3 or 4"}, true
	case lex <= 95:
		return CSAChoice{Classes: "B or A", Grades: "2, 3 or 4"}, true
	case lex <= 100:
		return CSAChoice{Classes: "A", Grades: "3 or 4"}, true
	case lex <= 105:
		return CSAChoice{Classes: "A", Grades: "4"}, true
	}
	return CSAChoice{Classes: "A", Grades: "3 or 4", MuffClasses: "A or B", MuffGrades: "2, 3 or 4", LimitedTime: lex > 110}, true
}
