package display

import (
	"bytes"
	"maps"
	"slices"
	"strings"
	"testing"
)

// Which forms go together: see the package comment.
func TestForms(t *testing.T) {
	for _, c := range []struct {
		name string
		doc  Document
		want []string
	}{
		{"text", Text{"a"}, []string{MIMEText}},
		{"formula", Formula{"a^2", "a^{2}"}, []string{MIMELaTeX, MIMEText}},
		{"formula without TeX", Formula{Text: "a^2"}, []string{MIMEText}},
		{"table", subfieldTable(), []string{MIMEHTML, MIMELaTeX, MIMEText}},
		{"verdict", irreducible(), []string{MIMEHTML, MIMELaTeX, MIMEText}},
		{"matrix", Matrix{Rows: [][]Cell{{{"1", "1"}}}}, []string{MIMELaTeX, MIMEText}},
		{"sequence", Sequence{"[", "]", []Cell{{"1", "1"}}, 0}, []string{MIMELaTeX, MIMEText}},
		{"figure", divisorLattice(12), []string{MIMEPDF, MIMESVG, MIMEHTML, MIMEText}},
		{"empty figure", Diagram{}, []string{MIMEText}},
	} {
		got := slices.Sorted(maps.Keys(c.doc.Bundle().Data))
		slices.Sort(c.want)
		if !slices.Equal(got, c.want) {
			t.Errorf("%s has the forms %v, want %v", c.name, got, c.want)
		}
	}
}

func TestSameBytesEveryTime(t *testing.T) {
	for _, n := range []int{12, 60, 360, 5040} {
		first, err := divisorLattice(n).Bundle().JSON()
		if err != nil {
			t.Fatal(err)
		}
		for range 3 {
			again, err := divisorLattice(n).Bundle().JSON()
			if err != nil || !bytes.Equal(first, again) {
				t.Fatalf("the lattice of %d comes out differently the second time (%v)", n, err)
			}
		}
	}
}

func TestJSON(t *testing.T) {
	b := Bundle{Data: map[string]any{"text/plain": "a < b & c", "b": []byte{1, 2}, "a": map[string]any{"z": 1, "y": 2}}}
	got, err := b.JSON()
	if err != nil {
		t.Fatal(err)
	}
	want := `{"data":{"a":{"y":2,"z":1},"b":"AQI=","text/plain":"a < b & c"},"metadata":{}}`
	if string(got) != want {
		t.Errorf("got  %s\nwant %s", got, want)
	}
}

func TestLimit(t *testing.T) {
	lines := strings.Repeat("0123456789\n", 100)
	b := Bundle{Data: map[string]any{MIMEText: lines, MIMEHTML: strings.Repeat("x", 500), MIMELaTeX: "$x$"}}
	got := b.Limit(200, "as CSV gives all")
	if _, kept := got.Data[MIMEHTML]; kept {
		t.Error("a form beyond the limit is still there")
	}
	if got.Data[MIMELaTeX] != "$x$" {
		t.Error("a short form is gone")
	}
	text := got.Data[MIMEText].(string)
	want := strings.Repeat("0123456789\n", 18) + "# 197 of 1100 bytes are shown; left out, too long: text/html (500 bytes); as CSV gives all"
	if text != want {
		t.Errorf("got %q\nwant %q", text, want)
	}
	if b.Data[MIMEText] != lines || b.Data[MIMEHTML] == nil {
		t.Error("Limit changed the bundle it was given")
	}
	if same := b.Limit(2000, ""); same.Data[MIMEText] != lines {
		t.Error("a bundle within the limit was changed")
	}
	// One line of wide characters is cut between two of them.
	long := Bundle{Data: map[string]any{MIMEText: strings.Repeat("é", 100)}}
	if text := long.Limit(51, "").Data[MIMEText].(string); !strings.HasPrefix(text, strings.Repeat("é", 25)+"\n# 50 of 200 bytes") {
		t.Errorf("cut inside a character: %q", text)
	}
}
