package lang

import (
	"fmt"
	"strconv"
	"strings"
)

// sexpr writes a tree as a compact s-expression, spans left out. It writes
// everything that two trees may differ in.
func sexpr(n Node) string {
	var b strings.Builder
	dump(&b, n)
	return b.String()
}

func sexprs(list []Stmt) string {
	lines := make([]string, len(list))
	for i, s := range list {
		lines[i] = sexpr(s)
	}
	return strings.Join(lines, "\n")
}

func dump(b *strings.Builder, n Node) {
	group := func(head string, parts ...any) {
		b.WriteString("(" + head)
		for _, part := range parts {
			switch part := part.(type) {
			case string:
				if part != "" {
					b.WriteString(" " + part)
				}
			case []Expr:
				for _, x := range part {
					b.WriteByte(' ')
					dump(b, x)
				}
			case []Arg:
				for _, a := range part {
					fmt.Fprintf(b, " (%s ", strings.TrimSpace(":"+a.Prep+" "+strings.Join(a.Role, "-")))
					dump(b, a.X)
					b.WriteByte(')')
				}
			case Expr:
				if part != nil {
					b.WriteByte(' ')
					dump(b, part)
				}
			case nil:
			default:
				panic(fmt.Sprintf("sexpr: %T", part))
			}
		}
		b.WriteByte(')')
	}
	flag := func(on bool, name string) string {
		if on {
			return name
		}
		return ""
	}
	switch n := n.(type) {
	case *Let:
		params := ""
		if n.Params != nil {
			params = "(params " + nameList(n.Params) + ")"
		}
		group("let", "("+nameList(n.Names)+")", params, n.Value)
	case *ExprStmt:
		dump(b, n.X)
	case *Claim:
		group("claim", n.X)
	case *Say:
		group("say", n.Args)
	case *Explain:
		group("explain", strings.Join(n.Words, " "))
	case *Clear:
		group("clear")
	case *Int:
		b.WriteString(n.Text)
		if n.Text != n.Value.String() {
			b.WriteString("=" + n.Value.String())
		}
	case *Str:
		b.WriteString(strconv.Quote(n.Value))
	case *Name:
		b.WriteString(n.Value)
	case *Subscript:
		group("_", n.Head, n.Index)
	case *Unary:
		group("sign"+n.Op, n.X)
	case *Binary:
		group(n.Op, flag(n.Juxtaposed, "beside"), n.X, n.Y)
	case *Relation:
		group("rel", flag(n.Mod != nil, "mod"), n.Mod, strings.Join(n.Ops, ","), n.Terms)
	case *Residue:
		group("mod", n.X, n.Mod)
	case *Predicate:
		group("is", flag(n.Not, "not"), flag(n.Verb, "verb"), flag(n.Article != "", "~"+n.Article), strings.Join(n.Words, "-"), n.X, n.Args)
	case *Logic:
		if n.Op == "not" {
			group("not", n.X)
		} else {
			group(n.Op, n.X, n.Y)
		}
	case *Over:
		group("over", n.X, n.K)
	case *As:
		group("as", strings.Join(n.Words, "-"), n.X, n.Args)
	case *Call:
		if n.Where != nil {
			group("call", n.Fn, n.Args, "where", n.Where)
		} else {
			group("call", n.Fn, n.Args)
		}
	case *Apply:
		group("apply", n.Word, n.X)
	case *GeneratedBy:
		group("generated", n.K, n.Name.Value)
	case *Index:
		group("index", n.X, n.Args)
	case *Prime:
		group("prime", n.X)
	case *Degree:
		group("degree", n.L, n.K)
	case *Phrase:
		group("phrase", strings.Join(n.Words, "-"), n.Args)
	case *If:
		group("if", n.Cond, n.Then, n.Else)
	case *Lambda:
		group("|->", "("+nameList(n.Params)+")", n.Body)
	case *List:
		group("list", n.Items)
	case *Set:
		group("set", n.Items)
	case *Tuple:
		group("tuple", n.Items)
	case *Range:
		group("..", n.From, n.To)
	case *Comprehension:
		parts := []any{n.X}
		for _, c := range n.Clause {
			parts = append(parts, "(for "+nameList(c.Names)+" "+sexpr(c.In)+")")
		}
		if n.Where != nil {
			parts = append(parts, "where", n.Where)
		}
		head := "each"
		if n.Braces {
			head = "each{}"
		}
		group(head, parts...)
	case *Cycle:
		points := make([]string, len(n.Points))
		for i, p := range n.Points {
			points[i] = p.String()
		}
		group("cycle", strings.Join(points, " "))
	case *Paren:
		group("paren", n.X)
	default:
		panic(fmt.Sprintf("sexpr: no rule for %T", n))
	}
}

func nameList(names []Name) string {
	words := make([]string, len(names))
	for i, n := range names {
		words[i] = n.Value
	}
	return strings.Join(words, " ")
}
