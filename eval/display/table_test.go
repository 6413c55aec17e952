package display

import (
	"encoding/csv"
	"encoding/xml"
	"fmt"
	"io"
	"strings"
	"testing"
)

func numbered(n int) Table {
	t := Table{Columns: []Column{{"n", Right}, {"n^2", Right}}}
	for i := range n {
		t.Rows = append(t.Rows, []Cell{{Text: fmt.Sprint(i)}, {Text: fmt.Sprint(i * i)}})
	}
	return t
}

func TestFoldingCountsExactly(t *testing.T) {
	for _, c := range []struct{ rows, total, shown, omitted int }{
		{0, 0, 0, 0}, {1, 1, 1, 0}, {60, 60, 60, 0}, {61, 61, 25, 36}, {6561, 6561, 25, 6536},
		{20, 6561, 20, 6541}, {100, 6561, 20, 6541}, {60, 61, 60, 1},
	} {
		tab := numbered(c.rows)
		tab.Total = c.total
		shown, omitted := 0, 0
		for _, p := range tab.parts() {
			shown += len(p.rows)
			omitted += p.omitted
		}
		if shown != c.shown || omitted != c.omitted {
			t.Errorf("of %d rows at hand of %d, %d are shown and %d counted as left out; want %d and %d", c.rows, c.total, shown, omitted, c.shown, c.omitted)
		}
		if omitted == 0 {
			continue
		}
		for _, text := range []string{tab.Text(), tab.HTML(), tab.LaTeX()} {
			if !strings.Contains(text, omission(c.omitted)) || !strings.Contains(text, fmt.Sprintf("%d of %d rows are shown", c.shown, c.total)) {
				t.Errorf("the counts of %d of %d are not in %s", c.shown, c.total, text)
			}
		}
	}
}

// Headed lines of a text table all end where the last column ends.
func TestTextIsAligned(t *testing.T) {
	tab := Table{
		Columns: []Column{{"name", Left}, {"値", Right}, {"e\u0301", Center}},
		Rows:    [][]Cell{{{Text: "αβ"}, {Text: "1"}, {Text: "x"}}, {{Text: "漢字漢"}, {Text: "1000"}, {Text: "xxxxx"}}},
	}
	want := "name      値    e\u0301\n------  ----  -----\nαβ         1    x\n漢字漢  1000  xxxxx"
	if got := tab.Text(); got != want {
		t.Errorf("got\n%s\nwant\n%s", got, want)
	}
}

func TestCSVReadsBack(t *testing.T) {
	tab := Table{
		Columns: []Column{{Head: "a"}, {Head: `b "quoted"`}},
		Rows:    [][]Cell{{{Text: "1, 2"}, {Text: "two\nlines"}}, {{Text: ` "`}}},
	}
	if !strings.HasSuffix(tab.CSV(), "\r\n") {
		t.Error("lines do not end in CRLF")
	}
	got, err := csv.NewReader(strings.NewReader(tab.CSV())).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	want := [][]string{{"a", `b "quoted"`}, {"1, 2", "two\nlines"}, {` "`, ""}}
	if fmt.Sprint(got) != fmt.Sprint(want) {
		t.Errorf("got %q, want %q", got, want)
	}
	if got := strings.Count(numbered(1000).CSV(), "\r\n"); got != 1001 {
		t.Errorf("CSV of 1000 rows has %d lines; it is not to be folded", got)
	}
}

// Beyond a hundred formulas the cells are not left to the reader to typeset.
func TestFewFormulas(t *testing.T) {
	tab := Table{Columns: []Column{{Head: "f"}}}
	for range fewFormulas {
		tab.Rows = append(tab.Rows, []Cell{{"x^2", "x^{2}"}})
	}
	tab.Columns = append(tab.Columns, Column{Head: "g"})
	tab.Rows = tab.Rows[:50]
	for i := range tab.Rows {
		tab.Rows[i] = append(tab.Rows[i], Cell{"x^3", "x^{3}"})
	}
	if got := strings.Count(tab.HTML(), `\(x^{3}\)`); got != 50 {
		t.Errorf("%d formulas are typeset, want 50", got)
	}
	tab.Rows = append(tab.Rows, []Cell{{"x^2", "x^{2}"}})
	if html := tab.HTML(); strings.Contains(html, `\(`) || !strings.Contains(html, "<i>x</i><sup>2</sup>") {
		t.Error("more than a hundred formulas are typeset")
	}
}

// The delimiters of a cell's formula cannot be closed from inside.
func TestBalanced(t *testing.T) {
	for tex, want := range map[string]bool{
		"x^{2}": true, "": true, `\{a\}`: true, `\left(\frac{a}{b}\right)`: true,
		`a\)b`: false, `\(`: false, "a$b": false, "{": false, "}{": false, `a\`: false, "50%": false,
	} {
		if balanced(tex) != want {
			t.Errorf("balanced(%q) is %v", tex, !want)
		}
	}
}

func wellFormed(t *testing.T, text string) string {
	t.Helper()
	var content strings.Builder
	d := xml.NewDecoder(strings.NewReader(text))
	for {
		token, err := d.Token()
		if err == io.EOF {
			return content.String()
		}
		if err != nil {
			t.Fatalf("%v in\n%s", err, text)
		}
		if data, ok := token.(xml.CharData); ok {
			content.Write(data)
		}
	}
}

func TestTableIsWellFormed(t *testing.T) {
	tab := subfieldTable()
	tab.Rows = append(tab.Rows, []Cell{{Text: `<b>&"'$\(`, TeX: "a<b"}, {Text: "</td>"}})
	tab.Caption, tab.Note = "a < b & c", "$1 and $2"
	wellFormed(t, tab.HTML())
	for _, banned := range []string{"<style", "class=", "var(--", "aria-", "<script"} {
		if strings.Contains(tab.HTML(), banned) {
			t.Errorf("%s would be dropped in a notebook that is not trusted", banned)
		}
	}
}
