package grid

import (
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

func TestDelimiter(t *testing.T) {
	many := func(row string) string { return strings.Repeat(row+"\n", 30) }
	for _, c := range []struct {
		name, text string
		want       byte
	}{
		{"commas", "id,date\n" + many("1,2025-03-04"), ','},
		{"tabs", "id\tjob, title\n" + many("1\tbender, big"), '\t'},
		{"bars", "id|name\n" + many("1|a, b"), '|'},
		{"semicolons", "id;value\n" + many("1;a"), ';'},
		{"decimal commas", "id;left;right\n" + many("1;12,5;37,5"), ';'},
		{"decimal commas in most rows", "id;left;right;dose\n" + many("1;12,5;37,5;62,5"), ';'},
		{"decimal commas without header", many("1,5;2,5"), ';'},
		{"one decimal comma and titles with commas", "Harrow & Slate, kiln-hill\nNoise, 2025\nDose, all\n\nid;group;dose;day\n" + many("1;press;62,5;x"), ';'},
		{"names with commas", "Name, first;Born\n" + many("Doe, Jo;1980"), ';'},
		{"lists with semicolons", "id,topics,date\n" + many("1,noise;protectors,2025-03-04"), ','},
		{"lists with semicolons, ragged", "id,topics,date,by,place,next\n" + strings.Repeat("1,a;b,2025,x,y,z\n1,a;b,2025\n", 6) + many("1,a;b,2025,x,y,z"), ','},
		{"semicolons within quotes", "\"a;b\",\"c;d\"\n" + many(`"1;2","3;4"`), ','},
		{"line breaks within quotes", "a;b\n" + many("\"x,\ny\";2"), ';'},
		{"separator line", "sep=|\na|b,c;d\n", '|'},
		{"separator line with tab", "sep=\t\na\tb\n", '\t'},
		{"separator line filled up", "\"sep=;\";;;\na;b\n", ';'},
		{"one column", "id\n1\n2\n", ','},
		{"empty", "", ','},
		{"title above", "Export of kiln-hill\nmade on 2025-03-04\n\nid,value\n" + many("1,2"), ','},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, about := table(t, open(t, "x.csv", c.text), Options{})
			require.Equal(t, string(c.want), string(about.Delimiter))
		})
	}
	_, about := table(t, open(t, "x.csv", "a;b,c\n"), Options{Delimiter: '|'})
	require.Equal(t, byte('|'), about.Delimiter, "what is stated is not looked for")
}

func TestDelimitedRows(t *testing.T) {
	long := strings.Repeat("x", MaxCell+1)
	for _, c := range []struct {
		name, text string
		o          Options
		want       []string
	}{
		{"blank rows are given", "a,b\n\n1,2\n,\n\n", Options{}, []string{"a|b", "", "1|2", "|", ""}},
		{"ragged rows are given", "a,b\n1\n1,2,3\n", Options{}, []string{"a|b", "1", "1|2|3"}},
		{"no last line end", "a,b\n1,2", Options{}, []string{"a|b", "1|2"}},
		{"CRLF", "a,b\r\n1,2\r\n", Options{}, []string{"a|b", "1|2"}},
		{"CR only", "a,b\r1,2\r", Options{}, []string{"a|b", "1|2"}},
		{"separator line", "sep=;\na;b\n", Options{}, []string{"sep=| (separator line)", "a|b"}},
		{"end mark", "a,b\n1,2\n\x1a", Options{}, []string{"a|b", "1|2", "\x1a"}},
		{"inches, strict", "a,b\n6\" tube,2\n3,4\n", Options{}, []string{"a|b", "! " + within, "3|4"}},
		{"inches, lenient", "a,b\n6\" tube,2\n\"6\"\" tube\",2\n", Options{Lenient: true}, []string{"a|b", `6" tube|2`, `6" tube|2`}},
		{"blank before a quote, strict", "a,b\n1, \"x, y\"\n", Options{}, []string{"a|b", "! " + within}},
		{"blank before a quote, lenient", "a,b\n1, \"x, y\"\n1, \"x\" y\n", Options{Lenient: true}, []string{"a|b", "1|x, y", `1| "x" y`}},
		{"quote never closed costs one line", "a,b\n\"x,1\n2,3\n", Options{Lenient: true}, []string{"a|b", "! " + noEnd, "2|3"}},
		{"text after a quote costs one line", "a,b\n\"x\ny\"z,1\n2,3\n", Options{Lenient: true}, []string{"a|b", "! " + lostEnd, `y"z|1`, "2|3"}},
		{"NUL", "a,b\n1,x\x00y\n2,3\n", Options{}, []string{"a|b", "! the cell holds a NUL byte", "2|3"}},
		{"long cell", "a,b\n1," + long + "\n2,3\n", Options{}, []string{"a|b", "! the cell is longer than 64 KiB", "2|3"}},
		{"10 MB cell", "a,b\n1,\"" + strings.Repeat("x", 10<<20) + "\"\n2,3\n", Options{}, []string{"a|b", "! the row is longer than 1024 KiB", "2|3"}},
	} {
		t.Run(c.name, func(t *testing.T) {
			got, _ := table(t, open(t, "x.csv", c.text), c.o)
			require.Equal(t, c.want, got)
		})
	}
}

func TestLinesOfRows(t *testing.T) {
	rows, err := open(t, "x.csv", "a,b\n\"x\n\ny\",1\n\"bad\n2,3\n").Rows(Options{})
	require.NoError(t, err)
	var got []string
	var r Row
	for rows.Next(&r) == nil {
		got = append(got, fmt.Sprintf("%d-%d", r.Line, r.Last))
	}
	require.Equal(t, []string{"1-1", "2-4", "5-5", "6-6"}, got)
}

func TestRowsAgain(t *testing.T) {
	f := open(t, "x.csv", "\xef\xbb\xbfa,b\n1,2\n")
	first, _ := table(t, f, Options{})
	second, _ := table(t, f, Options{})
	require.Equal(t, []string{"a|b", "1|2"}, first)
	require.Equal(t, first, second)
}
