package value

import (
	"fmt"
	"strings"

	"adjoin/algebra"
	"adjoin/eval/display"
)

// Factorization is a number or polynomial written as a unit times powers of
// irreducible factors, in canonical order. In arithmetic it stands for Of.
type Factorization struct {
	Of       Value
	Unit     Value // nil for 1
	Factors  []Factor
	Evidence algebra.Evidence // how sure it is that the factors are irreducible
}

// Factor is one irreducible factor with its multiplicity.
type Factor struct {
	F Value
	E int
}

func (Factorization) Kind() string             { return "a factorization" }
func (f Factorization) Text(p *Printer) string { return withRing(p, f) }

func (f Factorization) overText(p *Printer) (bare, ring string) {
	text := func(v Value) string {
		if o, ok := v.(overRing); ok {
			b, r := o.overText(p)
			if r != "" {
				ring = r
			}
			return b
		}
		return v.Text(p)
	}
	bare = f.written(text, "(", ")", " * ", func(s string, e int) string { return s + "^" + fmt.Sprint(e) })
	return bare, ring
}

func (f Factorization) TeX(p *Printer) string {
	return f.written(func(v Value) string { return TeX(p, v) }, `\left(`, `\right)`, ` `, func(s string, e int) string { return fmt.Sprintf("%s^{%d}", s, e) })
}

func (f Factorization) written(text func(Value) string, open, end, times string, power func(string, int) string) string {
	var parts []string
	if f.Unit != nil {
		u := text(f.Unit)
		if strings.Contains(u, " + ") {
			u = open + u + end
		}
		parts = append(parts, u)
	}
	for _, g := range f.Factors {
		s := text(g.F)
		if strings.Contains(strings.TrimPrefix(s, "-"), " ") && len(parts)+len(f.Factors) > 1 || strings.Contains(s, " ") && g.E > 1 {
			s = open + s + end
		}
		if g.E > 1 {
			s = power(s, g.E)
		}
		parts = append(parts, s)
	}
	if len(parts) == 0 {
		return "1"
	}
	if times == " " && is[Integer](f.Of) {
		times = ` \cdot `
	}
	return strings.Join(parts, times)
}

func (f Factorization) Canonical() (string, map[string]any) {
	var list []any
	for _, g := range f.Factors {
		list = append(list, map[string]any{"factor": machinePart(g.F), "multiplicity": g.E})
	}
	m := map[string]any{"of": machinePart(f.Of), "factors": list}
	if f.Unit != nil {
		m["unit"] = machinePart(f.Unit)
	}
	return "factorization", m
}

// Table lists the factors with their multiplicities.
func (f Factorization) Table(p *Printer) display.Document {
	n := &Notes{Caption: "Factors", Heads: []string{"factor", "multiplicity"}}
	for _, g := range f.Factors {
		n.Rows = append(n.Rows, []Value{g.F, Int(g.E)})
	}
	return n.table(p)
}
