package display

import (
	"fmt"
	"strings"
	"testing"
)

func TestTopLevelTerms(t *testing.T) {
	for tex, want := range map[string]int{
		"x^{2}+x+1": 3, "-x": 1, "-x+1": 2, "x^{-1}": 1, "(a+b)x": 1, "(a+b)x - 1": 2, "x = -1": 1, "2 \\cdot -3": 1,
		`\left(a+b\right)+c`: 1, "": 1, "a^{q+1} + a_{i-1}": 2, `\{a+b\}`: 2, "x+-1": 2,
	} {
		terms := topLevelTerms(tex)
		if len(terms) != want {
			t.Errorf("%q has the terms %q, want %d", tex, terms, want)
		}
		if got := strings.ReplaceAll(strings.Join(terms, " "), " ", ""); got != strings.ReplaceAll(tex, " ", "") {
			t.Errorf("the terms of %q make up %q", tex, got)
		}
	}
}

func TestLongPolynomialIsFolded(t *testing.T) {
	terms := make([]string, 901)
	for i := range terms {
		terms[i] = fmt.Sprintf("x^{%d}", 900-i)
	}
	got := Formula{TeX: strings.Join(terms, "+")}.LaTeX()
	want := `$\begin{aligned}&x^{900} +x^{899} +x^{898} +x^{897} +x^{896} +x^{895} +x^{894} +x^{893} + \cdots +x^{3} +x^{2} +x^{1} +x^{0}\quad\text{(901 terms)}\end{aligned}$`
	want = strings.NewReplacer(`\begin{aligned}&`, "", `\end{aligned}`, "").Replace(want)
	if got != want {
		t.Errorf("got  %s\nwant %s", got, want)
	}
	if f := (Formula{TeX: strings.Join(terms[:manyTerms], "+")}).LaTeX(); strings.Contains(f, "cdots") || strings.Count(f, "x^") != manyTerms {
		t.Errorf("%d terms are folded: %s", manyTerms, f)
	} else if !strings.Contains(f, `\begin{aligned}`) {
		t.Errorf("a sum of %d terms is not broken into lines: %s", manyTerms, f)
	}
}

func TestSequenceCounts(t *testing.T) {
	items := make([]Cell, 100)
	for i := range items {
		items[i] = Cell{Text: fmt.Sprint(i), TeX: fmt.Sprint(i)}
	}
	for _, c := range []struct {
		n, total int
		want     string
	}{
		{3, 3, "[0, 1, 2]"},
		{3, 0, "[0, 1, 2]"},
		{3, 9, "[0, 1, 2, ...]  # (9 items)"},
		{100, 100, "[0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16, 17, 18, 19, 20, 21, 22, 23, ..., 96, 97, 98, 99]  # (100 items)"},
	} {
		if got := (Sequence{"[", "]", items[:c.n], c.total}).Text(); got != c.want {
			t.Errorf("got %s, want %s", got, c.want)
		}
	}
}
