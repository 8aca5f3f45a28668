package draft

// personWords stand in names of columns about a person. Common practice, no source.
var personWords = words("name names surname forename firstname lastname phone telephone email address street ssn passport " +
	"vorname nachname telefon anschrift adresse strasse nom prenom nombre nombres apellido apellidos direccion telefono " +
	"nome sobrenome endereco telefone cognome indirizzo naam voornaam achternaam imie nazwisko adres namn fornamn efternamn navn fornavn etternavn efternavn 氏名 住所 電話")

// contactWords are those of them that tell without a look at the cells.
var contactWords = words("surname forename firstname lastname phone telephone email ssn passport vorname nachname telefon prenom apellido apellidos telefono " +
	"sobrenome telefone cognome voornaam achternaam nazwisko fornamn efternamn fornavn etternavn efternavn 氏名 住所 電話")

// aboutPerson says whether a column that no dictionary has holds names of people or how to reach them.
func aboutPerson(c *column) bool {
	for _, w := range tokens(c.rest) {
		if contactWords[w.text] || personWords[w.text] && c.p.most(c.p.names) {
			return true
		}
	}
	return false
}
