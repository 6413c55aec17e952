package lang

import (
	"math/big"
	"math/rand/v2"
	"testing"
)

// tree draws random trees. It draws every kind of node in every place where
// a value may stand, so most of them need parentheses to be written.
type tree struct{ *rand.Rand }

func (r tree) pick(list ...string) string { return list[r.IntN(len(list))] }

func (r tree) name() Name {
	return Name{Value: r.pick("x", "y", "a", "K", "x_1", "f", "alpha", "α", "f'", "Gal")}
}

// unprimed is a name as it stands in an expression. It is no word, since only
// the lexicon, which Print does not have, tells a word from a noun.
func (r tree) unprimed() string { return r.pick("x", "y", "a", "K", "x_1", "f", "α", "Gal") }

func (r tree) names(least int) []Name {
	list := make([]Name, least+r.IntN(2))
	for i := range list {
		list[i] = r.name()
	}
	return list
}

func (r tree) list(least, depth int) []Expr {
	list := make([]Expr, least+r.IntN(3))
	for i := range list {
		list[i] = r.expr(depth)
	}
	return list
}

func (r tree) number() *Int {
	text := r.pick("0", "1", "2", "17", "0x1f", "0b101", "1_000", "123456789012345678901234567890")
	return &Int{Value: integer(text), Text: text}
}

func (r tree) atom() Expr {
	switch r.IntN(8) {
	case 0, 1:
		return r.number()
	case 2:
		return &Str{Value: r.pick("", "a", "\"", "\\", "\n\t", "é")}
	case 3:
		return &Subscript{Head: r.pick("F", "g", "zeta"), Index: &Name{Value: "q"}}
	case 4:
		return &Cycle{Points: []*big.Int{big.NewInt(1), big.NewInt(int64(2 + r.IntN(9)))}}
	}
	return &Name{Value: r.unprimed()}
}

func (r tree) args(preps ...string) []Arg {
	var list []Arg
	for range r.IntN(3) {
		a := Arg{Prep: r.pick(preps...), X: r.expr(2)}
		if a.Prep == "from" && r.IntN(2) == 0 {
			a.Role = []string{"mask"}
		}
		list = append(list, a)
	}
	return list
}

func (r tree) expr(depth int) Expr {
	if depth <= 0 {
		return r.atom()
	}
	depth -= 1 + r.IntN(2)
	x := func() Expr { return r.expr(depth) }
	switch r.IntN(31) {
	case 0, 1:
		return &Unary{Op: r.pick("-", "+"), X: x()}
	case 2, 3, 4, 5:
		return &Binary{Op: r.pick("+", "-", "*", "/", "^"), X: x(), Y: x()}
	case 6:
		return &Binary{Op: "*", X: r.number(), Y: x(), Juxtaposed: true}
	case 7:
		n := 1 + r.IntN(3)
		rel := &Relation{Terms: []Expr{x()}}
		for range n {
			rel.Ops = append(rel.Ops, r.pick("=", "!=", "<", "<=", ">", ">=", "in", "not in", "divides", "does not divide"))
			rel.Terms = append(rel.Terms, x())
		}
		if r.IntN(2) == 0 {
			rel.Mod = x()
		}
		return rel
	case 8:
		return &Residue{X: x(), Mod: x()}
	case 9:
		p := &Predicate{X: x(), Not: r.IntN(2) == 0}
		switch r.IntN(3) {
		case 0:
			p.Words, p.Article = []string{"subfield", "of"}, r.pick("", "a", "the")
			p.Args = append(p.Args, Arg{X: x()})
		case 1:
			p.Words, p.Verb = []string{"embeds", "in"}, true
			p.Args = append(p.Args, Arg{X: x()})
		default:
			p.Words = []string{r.pick("prime", "irreducible", "primitive")}
		}
		p.Args = append(p.Args, r.args("over", "in")...)
		return p
	case 10:
		return &Logic{Op: "not", X: x()}
	case 11:
		return &Logic{Op: r.pick("and", "or"), X: x(), Y: x()}
	case 12:
		return &Over{X: x(), K: x()}
	case 13:
		return &As{X: x(), Words: []string{r.pick("table", "powers")}, Args: r.args("of", "in")}
	case 14:
		return &Call{Fn: x(), Args: r.list(0, depth)}
	case 15:
		// Equations are open to the right; those that are not the last must not be.
		c := &Call{Fn: x(), Args: r.list(1, depth)}
		for range 1 + r.IntN(len(c.Args)) {
			c.Where = append(c.Where, &Relation{Ops: []string{"="}, Terms: []Expr{r.atom(), &Paren{X: x()}}})
		}
		return c
	case 16:
		return &Apply{Word: "sqrt", X: r.operand(depth)}
	case 17:
		return &GeneratedBy{K: x(), Name: r.name()}
	case 18:
		return &Index{X: x(), Args: r.list(0, depth)}
	case 19:
		return &Prime{X: x()}
	case 20:
		return &Degree{L: x(), K: x()}
	case 21, 22:
		args := r.args("of", "over", "in", "to", "from", "at", "by", "with")
		words := []string{"minimal", "polynomial"}
		if len(args) > 0 && r.IntN(2) == 0 {
			words = []string{"trace"}
		}
		return &Phrase{Words: words, Args: args}
	case 23:
		return &If{Cond: x(), Then: x(), Else: x()}
	case 24:
		return &Lambda{Params: r.names(0), Body: x()}
	case 25:
		return &List{Items: r.list(0, depth)}
	case 26:
		return &Set{Items: r.list(0, depth)}
	case 27:
		return &Tuple{Items: r.list(2, depth)}
	case 28:
		return &Range{From: x(), To: x()}
	case 29:
		c := &Comprehension{Braces: r.IntN(2) == 0, X: x()}
		for range 1 + r.IntN(2) {
			c.Clause = append(c.Clause, Clause{Names: r.names(1), In: x()})
		}
		if r.IntN(2) == 0 {
			c.Where = x()
		}
		return c
	}
	return &Paren{X: x()}
}

// operand is what may follow sqrt: nothing that begins with a parenthesis.
func (r tree) operand(depth int) Expr {
	switch r.IntN(4) {
	case 0:
		return &Unary{Op: "-", X: r.number()}
	case 1:
		return &Apply{Word: "sqrt", X: r.operand(depth - 1)}
	case 2:
		return &List{Items: r.list(0, depth)}
	}
	return r.number()
}

func (r tree) stmt() Stmt {
	x := r.expr(5)
	switch r.IntN(6) {
	case 0:
		return &Let{Names: []Name{r.name()}, Value: x}
	case 1:
		return &Let{Names: []Name{{Value: "f"}}, Params: r.names(1), Value: x}
	case 2:
		return &Let{Names: r.names(2), Value: x}
	case 3:
		return &Claim{X: x}
	case 4:
		return &Say{Args: r.list(1, 4)}
	}
	return &ExprStmt{X: x}
}

// plainParens writes a tree without the parentheses that only printing needs.
func plainParens(n Node) string {
	return sexpr(unparen(n).(Node))
}

// A random tree prints to a text that parses, gives the same tree but for
// parentheses, and prints to itself.
func TestRandomTreesPrintAndParse(t *testing.T) {
	const seed = 20260
	rounds := 20_000
	if testing.Short() {
		rounds = 3_000
	}
	t.Logf("seed %d", seed)
	r := tree{rand.New(rand.NewPCG(seed, 0))}
	for i := range rounds {
		s := r.stmt()
		text := Print(s)
		list, fault := Parse(text, testLexicon)
		if fault != nil {
			t.Fatalf("tree %d:\n%s\nprints as\n%s\nwhich does not parse: %v", i, sexpr(s), text, showFault(text, fault))
		}
		if len(list) != 1 || plainParens(list[0]) != plainParens(s) {
			t.Fatalf("tree %d:\n%s\nprints as\n%s\nand is read back as\n%s", i, sexpr(s), text, sexprs(list))
		}
		checkRoundTrip(t, text, list)
	}
}
