package convert

import "hearduty/internal/calendar"

// monthNames are the months in English, French, German, Spanish, Portuguese, Italian, Dutch, Polish, and
// Danish, Norwegian and Swedish, in Polish in both cases that dates have, with their abbreviations
// (common practice, no source), and in Thai (from memory), by Fold.
var monthNames = [12][]string{
	{"january", "jan", "janvier", "janv", "januar", "janner", "jaenner", "enero", "ene", "janeiro", "gennaio", "gen", "januari", "styczen", "stycznia", "sty", "มกราคม", "ม.ค."},
	{"february", "feb", "february", "fevrier", "fevr", "fev", "februar", "feber", "febrero", "fevereiro", "febbraio", "februari", "luty", "lutego", "lut", "febr", "กุมภาพันธ์", "ก.พ."},
	{"march", "mar", "mars", "marz", "maerz", "mrz", "marzo", "marco", "maart", "mrt", "marzec", "marca", "marts", "มีนาคม", "มี.ค."},
	{"april", "apr", "avril", "avr", "abril", "abr", "aprile", "kwiecien", "kwietnia", "kwi", "เมษายน", "เม.ย."},
	{"may", "mai", "mayo", "maio", "maggio", "mag", "mei", "maj", "maja", "พฤษภาคม", "พ.ค."},
	{"june", "jun", "juin", "juni", "junio", "junho", "giugno", "giu", "czerwiec", "czerwca", "cze", "มิถุนายน", "มิ.ย."},
	{"july", "jul", "juillet", "juil", "juli", "julio", "julho", "luglio", "lug", "lipiec", "lipca", "lip", "กรกฎาคม", "ก.ค."},
	{"august", "aug", "aout", "aou", "agosto", "ago", "augustus", "sierpien", "sierpnia", "sie", "augusti", "สิงหาคม", "ส.ค."},
	{"september", "sep", "sept", "septembre", "septiembre", "setiembre", "setembro", "set", "settembre", "sett", "wrzesien", "wrzesnia", "wrz", "กันยายน", "ก.ย."},
	{"october", "oct", "octobre", "oktober", "okt", "octubre", "outubro", "out", "ottobre", "ott", "pazdziernik", "pazdziernika", "paz", "ตุลาคม", "ต.ค."},
	{"november", "nov", "novembre", "noviembre", "novembro", "listopad", "listopada", "lis", "พฤศจิกายน", "พ.ย."},
	{"december", "dec", "decembre", "dezember", "dez", "diciembre", "dic", "dezembro", "dicembre", "grudzien", "grudnia", "gru", "desember", "des", "ธันวาคม", "ธ.ค."},
}

// dayNames are the days of the week, Sunday first, in the same languages (common practice, no source), by Fold.
var dayNames = [7][]string{
	{"sunday", "sun", "dimanche", "sonntag", "domingo", "domenica", "zondag", "niedziela", "sondag"},
	{"monday", "mon", "lundi", "montag", "lunes", "segunda", "lunedi", "maandag", "poniedzialek", "mandag"},
	{"tuesday", "tue", "tues", "mardi", "dienstag", "martes", "terca", "martedi", "dinsdag", "wtorek", "tirsdag", "tisdag"},
	{"wednesday", "wed", "mercredi", "mittwoch", "miercoles", "quarta", "mercoledi", "woensdag", "sroda", "onsdag"},
	{"thursday", "thu", "thur", "thurs", "jeudi", "donnerstag", "jueves", "quinta", "giovedi", "donderdag", "czwartek", "torsdag"},
	{"friday", "fri", "vendredi", "freitag", "viernes", "sexta", "venerdi", "vrijdag", "piatek", "fredag"},
	{"saturday", "sat", "samedi", "samstag", "sonnabend", "sabado", "sabato", "zaterdag", "sobota", "lordag"},
}

var (
	months   = index(monthNames[:])
	weekdays = index(dayNames[:])
)

// index gives for each word the number of its list, from 1.
func index(lists [][]string) map[string]int {
	m := map[string]int{}
	for i, words := range lists {
		for _, w := range words {
			m[Fold(w)] = i + 1
		}
	}
	return m
}

// between are words within a date that say nothing, and endings those of ordinals, such as 4th and 1er (common
// practice, no source), by Fold.
var (
	between = set("of", "the", "de", "del", "do", "di", "den", "der", "le", "el")
	endings = set("st", "nd", "rd", "th", "er", "e", "o", "a")
)

func set(words ...string) map[string]bool {
	m := map[string]bool{}
	for _, w := range words {
		m[w] = true
	}
	return m
}

// era is one of the Japanese eras, with the year that was its first, its first day, and the first day of the next.
type era struct {
	names       []string
	year        int
	first, next calendar.Date
}

// eras have their days from the public documentation of the Japanese calendar in the standard libraries of two
// languages, which agree; for Reiwa from one of them. Until 1872 the calendar counted lunar months, which are
// not read.
var eras = []era{
	{[]string{"明治", "㍾", "M"}, 1868, calendar.MustParse("1873-01-01"), calendar.MustParse("1912-07-30")},
	{[]string{"大正", "㍽", "T"}, 1912, calendar.MustParse("1912-07-30"), calendar.MustParse("1926-12-25")},
	{[]string{"昭和", "㍼", "S"}, 1926, calendar.MustParse("1926-12-25"), calendar.MustParse("1989-01-08")},
	{[]string{"平成", "㍻", "H"}, 1989, calendar.MustParse("1989-01-08"), calendar.MustParse("2019-05-01")},
	{[]string{"令和", "㋿", "R"}, 2019, calendar.MustParse("2019-05-01"), calendar.MustParse("9999-12-31")},
}
