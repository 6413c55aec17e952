package display

import (
	"flag"
	"fmt"
	"os"
	"path/filepath"
	"testing"

	"adjoin/algebra"
)

var update = flag.Bool("update", false, "rewrite the golden files")

// golden compares got with the file of that name.
func golden(t *testing.T, name string, got string) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if *update {
		if err := os.WriteFile(path, []byte(got), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if got != string(want) {
		t.Errorf("%s differs; run with -update and look at the difference\ngot:\n%s", name, got)
	}
}

func primeFactors(n int) (list []int) {
	for d := 2; n > 1; d++ {
		for ; n%d == 0; n /= d {
			list = append(list, d)
		}
	}
	return list
}

// divisorLattice is the diagram of the subfields of F_{2^n}.
func divisorLattice(n int) Diagram {
	d := Diagram{
		Title:   fmt.Sprintf("Subfields of F_{2^%d}", n),
		Caption: fmt.Sprintf("The subfields of F_{2^%d}; on each edge stands the degree.", n),
	}
	for a := 1; a <= n; a++ {
		if n%a != 0 {
			continue
		}
		node := Node{ID: fmt.Sprint(a), Label: fmt.Sprintf("F_{2^%d}", a), Sub: fmt.Sprintf("g_{2^%d}", a), Rank: len(primeFactors(a)), Emph: a == 1 || a == n}
		if a == 1 {
			node.Label, node.Sub = "F_2", ""
		}
		d.Nodes = append(d.Nodes, node)
		for b := a + 1; b <= n; b++ {
			if n%b == 0 && b%a == 0 && len(primeFactors(b/a)) == 1 {
				d.Edges = append(d.Edges, Edge{From: fmt.Sprint(a), To: fmt.Sprint(b), Label: fmt.Sprint(b / a)})
			}
		}
	}
	return d
}

// subfieldTable is the kind of table that a session shows.
func subfieldTable() Table {
	return Table{
		Caption: "Subfields of F_{2^12}",
		Columns: []Column{{"degree", Right}, {"field", Left}, {"generator", Left}, {"minimal polynomial", Left}},
		Rows: [][]Cell{
			{{"1", "1"}, {"F_2", `\mathbb{F}_{2}`}, {"1", "1"}, {"x + 1", "x+1"}},
			{{"2", "2"}, {"F_4", `\mathbb{F}_{4}`}, {"a^1365", "a^{1365}"}, {"x^2 + x + 1", "x^{2}+x+1"}},
			{{"12", "12"}, {"F_{2^12}", `\mathbb{F}_{2^{12}}`}, {"a", "a"}, {"x^12 + x^7 + x^6 + x^5 + x^3 + x + 1", "x^{12}+x^{7}+x^{6}+x^{5}+x^{3}+x+1"}},
		},
		Note: "minimal polynomials over F_2",
	}
}

func irreducible() Verdict {
	e := algebra.Evidence{Standing: algebra.Proved, Reason: "x^(2^4) = x mod f, and no factor of degree 1 or 2 (Rabin)", Source: "M. O. Rabin, Probabilistic algorithms in finite fields, 1980"}
	return Verdict{Text: "true", Evidence: e.With("gcd(x^(2^2) - x, f)", 1)}
}

func TestGolden(t *testing.T) {
	table := subfieldTable()
	golden(t, "table.txt", table.Text())
	golden(t, "table.html", table.HTML())
	golden(t, "table.tex", table.LaTeX())
	golden(t, "table.csv", table.CSV())
	verdict := irreducible()
	golden(t, "verdict.html", verdict.HTML())
	golden(t, "verdict.tex", verdict.LaTeX())
	golden(t, "evidence.txt", verdict.Table().Text())
	m := Matrix{Rows: [][]Cell{{{"1", "1"}, {"a", "a"}}, {{"a + 1", "a+1"}, {"0", ""}}}}
	golden(t, "matrix.txt", m.Text())
	golden(t, "matrix.tex", m.LaTeX())
	for _, n := range []int{12, 60} {
		d := divisorLattice(n)
		golden(t, fmt.Sprintf("lattice%d.txt", n), d.Text())
		golden(t, fmt.Sprintf("lattice%d.svg", n), d.SVG())
		golden(t, fmt.Sprintf("lattice%d.tikz", n), d.TikZ())
	}
}
