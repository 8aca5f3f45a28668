package draft

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
)

// TestRostersInManyLanguages reads rosters of the same two people. Names common practice, no source.
func TestRostersInManyLanguages(t *testing.T) {
	for language, c := range map[string]struct{ header, male, female string }{
		"English":    {"Employee No;Name;Gender;Date of Birth;Hire Date;Termination Date;Job Title;Plant", "male", "female"},
		"German":     {"Personal-Nr.;Nachname;Geschlecht;Geburtsdatum;Eintrittsdatum;Austrittsdatum;Tätigkeit;Werk", "männlich", "weiblich"},
		"French":     {"Matricule;Nom;Sexe;Date de naissance;Date d'embauche;Date de sortie;Poste;Établissement", "homme", "femme"},
		"Spanish":    {"Nº empleado;Apellidos;Sexo;Fecha de nacimiento;Fecha de alta;Fecha de baja;Puesto;Centro de trabajo", "hombre", "mujer"},
		"Portuguese": {"Matrícula;Nome;Sexo;Data de nascimento;Data de admissão;Data de demissão;Função;Unidade", "masculino", "feminino"},
		"Italian":    {"Matricola;Cognome;Sesso;Data di nascita;Data di assunzione;Data di cessazione;Mansione;Stabilimento", "maschio", "femmina"},
		"Dutch":      {"Personeelsnummer;Achternaam;Geslacht;Geboortedatum;Datum in dienst;Datum uit dienst;Functie;Vestiging", "man", "vrouw"},
		"Polish":     {"Nr pracownika;Nazwisko;Płeć;Data urodzenia;Data zatrudnienia;Data zwolnienia;Stanowisko;Zakład", "mężczyzna", "kobieta"},
		"Swedish":    {"Anställningsnr;Efternamn;Kön;Födelsedatum;Anställningsdatum;Slutdatum;Befattning;Anläggning", "man", "kvinna"},
		"Danish":     {"Medarbejdernr.;Efternavn;Køn;Fødselsdato;Ansættelsesdato;Fratrædelsesdato;Stilling;Fabrik", "mand", "kvinde"},
		"Norwegian":  {"Ansattnr;Etternavn;Kjønn;Fødselsdato;Ansettelsesdato;Sluttdato;Stilling;Anlegg", "mann", "kvinne"},
		"Japanese":   {"社員番号;氏名;性別;生年月日;入社日;退職日;職種;事業所", "男性", "女性"},
	} {
		got := of(t, "roster.csv", c.header+"\n"+
			"A1;Avelin Marrow;"+c.male+";1975-03-04;2010-01-01;;caster;kiln-hill\n"+
			"A2;Bastian Quill;"+c.female+";1976-03-04;2010-01-01;2024-01-31;caster;kiln-hill\n")
		read, names := active(got), strings.Split(c.header, ";")
		assert.Contains(t, read, "kind: worker", language)
		for i, field := range []string{"worker_id", "", "sex", "birth_date", "hired_on", "left_on", "job_title", "site"} {
			if field == "" {
				assert.Contains(t, got, "- "+quote(names[i])+" # personal", language)
				continue
			}
			assert.Contains(t, strings.ReplaceAll(read, "\n    column:", ""), "  "+field+": "+quote(names[i]), language)
		}
		if c.male != "male" { // the words of records need no table
			assert.Contains(t, read, quote(c.male)+": male", language)
			assert.Contains(t, read, quote(c.female)+": female", language)
		}
		assert.Contains(t, got, "# No question is open.", language)
		assert.NotContains(t, got, "Marrow", language)
	}
}

// TestEarsInManyLanguages reads wide audiograms.
func TestEarsInManyLanguages(t *testing.T) {
	for _, ears := range []string{
		"R,L", "Right ,Left ", "OD ,OG ", "D,G", "Droite ,Gauche ", "DX ,SX ", "D,S", "rechts ,links ", "Prawe ,Lewe ", "P,L", "Höger ,Vänster ", "H,V",
		"Højre ,Venstre ", "Direita ,Esquerda ", "D,E", "Derecho ,Izquierdo ", "D,I", "右,左", "HTL_R_,HTL_L_", "RE_,LE_",
	} {
		right, left, _ := strings.Cut(ears, ",")
		var names []string
		for _, ear := range []string{left, right} {
			for _, hz := range []string{"500", "1000", "2000", "3000", "4000"} {
				names = append(names, ear+hz)
			}
		}
		got := active(of(t, "tests.csv", "Emp no,Test date,"+strings.Join(names, ",")+"\nA1,2025-03-04,1,2,3,4,5,6,7,8,9,10\n"))
		assert.Contains(t, got, "  left.500: "+quote(left+"500"), ears)
		assert.Contains(t, got, "  right.4000: "+quote(right+"4000"), ears)
	}
	open := of(t, "tests.csv", "Emp no,Test date,R500,R1000,R2000,G500,G1000,G2000\nA1,2025-03-04,1,2,3,4,5,6\n")
	assert.Contains(t, open, "Which ears do the letters")
	assert.NotContains(t, active(open), "R500")
}
