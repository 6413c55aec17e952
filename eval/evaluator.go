package eval

import (
	"fmt"
	"math/big"
	"slices"
	"strings"

	"adjoin/algebra"
	"adjoin/eval/value"
	"adjoin/eval/vocabulary"
	"adjoin/lang"
)

// eval is the value of an expression. Its errors are faults with a place.
func (c *cell) eval(x lang.Expr) (value.Value, error) {
	outer := c.at.Load()
	c.enter(x.Span())
	if err := c.ctx.Enter(); err != nil {
		return nil, at(x.Span(), err)
	}
	v, err := c.node(x)
	c.ctx.Leave()
	if err != nil {
		return nil, at(x.Span(), err)
	}
	c.at.Store(outer)
	return v, nil
}

// plain is the value of an expression without the form it is shown in.
func (c *cell) plain(x lang.Expr) (value.Value, error) {
	v, err := c.eval(x)
	if err != nil {
		return nil, err
	}
	return value.Plain(v), nil
}

func (c *cell) node(x lang.Expr) (value.Value, error) {
	switch x := x.(type) {
	case *lang.Int:
		return value.Integer{N: x.Value}, nil
	case *lang.Str:
		return value.Text{S: x.Value}, nil
	case *lang.Name:
		return c.name(x.Value)
	case *lang.Subscript:
		return c.subscript(x)
	case *lang.Paren:
		return c.eval(x.X)
	case *lang.Unary:
		return c.unary(x)
	case *lang.Binary:
		a, b, err := c.pair(x.X, x.Y)
		if err != nil {
			return nil, err
		}
		return value.Operate(c.ctx, x.Op, a, b)
	case *lang.Relation:
		return c.relation(x)
	case *lang.Residue:
		m, err := c.plain(x.Mod)
		if err != nil {
			return nil, err
		}
		return c.modulo(x.X, m)
	case *lang.Logic:
		return c.logic(x)
	case *lang.Over:
		return c.over(x)
	case *lang.If:
		v, err := c.truth(x.Cond)
		if err != nil {
			return nil, err
		}
		if v.Holds {
			return c.eval(x.Then)
		}
		return c.eval(x.Else)
	case *lang.Degree:
		a, b, err := c.pair(x.L, x.K)
		if err != nil {
			return nil, err
		}
		return value.DegreeOver(c.ctx, a, b)
	case *lang.Lambda:
		params, err := parameters(x.Params)
		if err != nil {
			return nil, err
		}
		return c.closure(lang.Print(x), params, x.Body, c.scope), nil
	case *lang.Call:
		return c.call(x)
	case *lang.Index:
		return c.index(x)
	case *lang.Prime:
		return c.phrase(&lang.Phrase{Words: []string{"derivative"}, Args: []lang.Arg{{Prep: "of", X: x.X}}}, x.Span())
	case *lang.Phrase:
		return c.phrase(x, x.Span())
	case *lang.Predicate:
		return c.predicate(x)
	case *lang.As:
		return c.form(x)
	case *lang.Apply:
		return c.phrase(&lang.Phrase{Words: []string{x.Word}, Args: []lang.Arg{{Prep: "of", X: x.X}}}, x.Span())
	case *lang.GeneratedBy:
		return c.generatedBy(x)
	case *lang.List:
		items, err := c.all(x.Items)
		return value.List{Items: items}, err
	case *lang.Tuple:
		items, err := c.all(x.Items)
		return value.Tuple{Items: items}, err
	case *lang.Set:
		items, err := c.all(x.Items)
		if err != nil {
			return nil, err
		}
		return value.NewSet(c.ctx, items)
	case *lang.Range:
		return c.rangeOf(x)
	case *lang.Comprehension:
		return c.comprehension(x)
	case *lang.Cycle:
		return nil, algebra.Errorf(algebra.Unable, "permutations are not supported")
	}
	return nil, fmt.Errorf("expression %T", x)
}

func (c *cell) pair(x, y lang.Expr) (a, b value.Value, err error) {
	if a, err = c.plain(x); err != nil {
		return nil, nil, err
	}
	b, err = c.plain(y)
	return a, b, err
}

func (c *cell) all(list []lang.Expr) ([]value.Value, error) {
	items := make([]value.Value, len(list))
	for i, x := range list {
		v, err := c.plain(x)
		if err != nil {
			return nil, err
		}
		items[i] = v
	}
	return items, nil
}

// name is what a name stands for: what it is bound to, a fixed name of the
// language, or an indeterminate.
func (c *cell) name(name string) (value.Value, error) {
	if v, ok := c.scope.find(name); ok {
		return v, nil
	}
	for i := len(c.introduced) - 1; i >= 0; i-- {
		if c.introduced[i].name == name {
			return c.introduced[i].v, nil
		}
	}
	if v, ok := vocabulary.Constants[name]; ok {
		return v, nil
	}
	if value.IsLetter(name) {
		return value.Indeterminate(name), nil
	}
	return nil, c.unknownName(name)
}

// subscript is F_q or g_q. An index that is written as a power is not
// multiplied out.
func (c *cell) subscript(x *lang.Subscript) (value.Value, error) {
	index, exponent := x.Index, value.Int(1).N
	for {
		p, ok := index.(*lang.Paren)
		if !ok {
			break
		}
		index = p.X
	}
	if power, ok := index.(*lang.Binary); ok && power.Op == "^" {
		n, err := c.indexInteger(x.Head, power.Y)
		if err != nil {
			return nil, err
		}
		index, exponent = power.X, n
	}
	q, err := c.indexInteger(x.Head, index)
	if err != nil {
		return nil, err
	}
	switch x.Head {
	case "F":
		return value.StandardField(c.ctx, q, exponent)
	case "g":
		return value.StandardGenerator(c.ctx, q, exponent)
	}
	return nil, algebra.Errorf(algebra.Unable, "%s_%s belongs to number fields, which are not supported", x.Head, lang.Print(x.Index))
}

func (c *cell) indexInteger(head string, x lang.Expr) (*big.Int, error) {
	v, err := c.plain(x)
	if err != nil {
		return nil, err
	}
	n, ok := v.(value.Integer)
	if !ok {
		return nil, blame(x, algebra.Invalid, "the index of %s is an integer, not %s", head, v.Kind())
	}
	return n.N, nil
}

func (c *cell) unary(x *lang.Unary) (value.Value, error) {
	v, err := c.plain(x.X)
	if err != nil || x.Op == "+" {
		return v, err
	}
	return value.Negate(c.ctx, v)
}

func (c *cell) truth(x lang.Expr) (value.Verdict, error) {
	v, err := c.plain(x)
	if err != nil {
		return value.Verdict{}, err
	}
	t, ok := v.(value.Verdict)
	if !ok {
		return t, blame(x, algebra.Invalid, "this should be true or false, and it is %s", v.Kind())
	}
	return t, nil
}

func (c *cell) logic(x *lang.Logic) (value.Value, error) {
	answer := value.Verdict{Claim: func() string { return lang.Print(x) }}
	a, err := c.truth(x.X)
	if err != nil {
		return nil, err
	}
	if x.Op == "not" {
		answer.Verdict, answer.Plain = value.Not(a.Verdict), a.Plain
		return answer, nil
	}
	if a.Holds == (x.Op == "or") { // the first part settles it
		answer.Verdict, answer.Plain = a.Verdict, a.Plain
		return answer, nil
	}
	b, err := c.truth(x.Y)
	if err != nil {
		return nil, err
	}
	answer.Plain = a.Plain && b.Plain
	if x.Op == "and" {
		answer.Verdict = value.And(a.Verdict, b.Verdict)
	} else {
		answer.Verdict = value.Or(a.Verdict, b.Verdict)
	}
	return answer, nil
}

// relation evaluates a chain: every neighbouring pair must be related.
func (c *cell) relation(x *lang.Relation) (value.Value, error) {
	var modulus value.Value
	if x.Mod != nil {
		m, err := c.plain(x.Mod)
		if err != nil {
			return nil, err
		}
		modulus = m
	}
	side := func(x lang.Expr) (value.Value, error) {
		if modulus == nil {
			return c.plain(x)
		}
		return c.modulo(x, modulus)
	}
	left, err := side(x.Terms[0])
	if err != nil {
		return nil, err
	}
	answer := value.Verdict{Plain: modulus == nil, Claim: func() string { return lang.Print(x) }}
	for i, op := range x.Ops {
		right, err := side(x.Terms[i+1])
		if err != nil {
			return nil, err
		}
		v, err := value.Relate(c.ctx, op, left, right, modulus)
		if err != nil {
			return nil, err
		}
		answer.Plain = answer.Plain && value.IsPlainRelation(op, left)
		if i == 0 {
			answer.Verdict = v
		} else {
			answer.Verdict = value.And(answer.Verdict, v)
		}
		if !answer.Holds {
			break
		}
		left = right
	}
	return answer, nil
}

func (c *cell) rangeOf(x *lang.Range) (value.Value, error) {
	a, b, err := c.pair(x.From, x.To)
	if err != nil {
		return nil, err
	}
	from, ok := a.(value.Integer)
	to, ok2 := b.(value.Integer)
	if !ok || !ok2 {
		return nil, algebra.Errorf(algebra.Invalid, "a range runs from an integer to an integer")
	}
	return value.Range{From: from.N, To: to.N}, nil
}

func (c *cell) index(x *lang.Index) (value.Value, error) {
	v, err := c.plain(x.X)
	if err != nil {
		return nil, err
	}
	if value.IsRing(v) {
		letters := make([]string, len(x.Args))
		for i, a := range x.Args {
			n, ok := a.(*lang.Name)
			if !ok {
				return nil, blame(a, algebra.Invalid, "a polynomial ring is written with its letter: K[x]")
			}
			letters[i] = n.Value
		}
		return value.NewPolynomialRing(v, letters)
	}
	args, err := c.all(x.Args)
	if err != nil {
		return nil, err
	}
	for _, a := range args {
		n, ok := a.(value.Integer)
		if !ok {
			return nil, algebra.Errorf(algebra.Invalid, "a place in a list is an integer, not %s", a.Kind())
		}
		if v, err = value.At(v, n.N); err != nil {
			return nil, err
		}
	}
	return v, nil
}

func (c *cell) comprehension(x *lang.Comprehension) (value.Value, error) {
	var items []value.Value
	var wrote *value.Written
	if t, ok := x.X.(*lang.Tuple); ok {
		wrote = new(value.Written)
		for _, place := range t.Items {
			wrote.Heads = append(wrote.Heads, lang.Print(place))
		}
	}
	outer := c.scope
	defer func() { c.scope = outer }()
	var run func(k int) error
	run = func(k int) error {
		if k == len(x.Clause) {
			if x.Where != nil {
				v, err := c.truth(x.Where)
				if err != nil || !v.Holds {
					return err
				}
			}
			v, err := c.member(x.X, wrote)
			if err != nil {
				return err
			}
			items = append(items, v)
			return c.ctx.CheckLength(big.NewInt(int64(len(items))))
		}
		clause := x.Clause[k]
		in, err := c.plain(clause.In)
		if err != nil {
			return err
		}
		members, ok := in.(value.Collection)
		if !ok {
			return blame(clause.In, algebra.Invalid, "%s has no members to run through", in.Kind())
		}
		if x.Where == nil { // every member gives at least one item, or none gives any
			if err := c.ctx.CheckLength(members.Len()); err != nil {
				return at(clause.In.Span(), err)
			}
		}
		scope := c.scope
		for v, err := range members.All(c.ctx) {
			if err != nil {
				return err
			}
			c.ctx.W.Poll()
			if c.scope, err = bindAll(c.ctx, scope, clause.Names, v); err != nil {
				return at(clause.In.Span(), err)
			}
			if err := run(k + 1); err != nil {
				return err
			}
		}
		c.scope = scope
		return nil
	}
	if err := run(0); err != nil {
		return nil, err
	}
	if x.Braces {
		return value.NewSet(c.ctx, items)
	}
	list := value.List{Items: items}
	list.Wrote = wrote
	return list, nil
}

// member is one item of a comprehension. Where it is a tuple some of whose
// places choose a form, the forms are kept aside for a table.
func (c *cell) member(x lang.Expr, wrote *value.Written) (value.Value, error) {
	t, ok := x.(*lang.Tuple)
	if !ok || !slices.ContainsFunc(t.Items, choosesForm) {
		return c.plain(x)
	}
	row, plain := make([]value.Value, len(t.Items)), make([]value.Value, len(t.Items))
	for i, place := range t.Items {
		v, err := c.eval(place)
		if err != nil {
			return nil, err
		}
		row[i], plain[i] = v, value.Plain(v)
	}
	wrote.Rows = append(wrote.Rows, row)
	return value.Tuple{Items: plain}, nil
}

func choosesForm(x lang.Expr) bool {
	_, ok := x.(*lang.As)
	return ok
}

// bindAll binds one name to a value, or several to the parts of it.
func bindAll(ctx *value.Context, s *scope, names []lang.Name, v value.Value) (*scope, error) {
	if len(names) == 1 {
		return s.bind(names[0].Value, v), nil
	}
	parts, ok := value.Plain(v).(value.Collection)
	if !ok || parts.Len() == nil || parts.Len().Cmp(big.NewInt(int64(len(names)))) != 0 {
		return nil, algebra.Errorf(algebra.Invalid, "%d names want as many values, but this is %s", len(names), v.Kind())
	}
	members, err := value.Members(ctx, parts)
	if err != nil {
		return nil, err
	}
	for i, n := range names {
		s = s.bind(n.Value, members[i])
	}
	return s, nil
}

// closure is a function that evaluates body among the names of scope.
func (c *cell) closure(source string, params []string, body lang.Expr, scope *scope) value.Function {
	src := c.src
	return value.Function{
		Source: source,
		Params: params,
		Arity:  len(params),
		Apply: func(ctx *value.Context, args []value.Value) (value.Value, error) {
			inner := scope
			for i, p := range params {
				inner = inner.bind(p, args[i])
			}
			callee := &cell{src: src, out: c.out, ctx: ctx, scope: inner, limit: c.limit}
			v, err := callee.plain(body)
			if err != nil {
				return nil, uprooted(err)
			}
			return v, nil
		},
	}
}

func parameters(names []lang.Name) ([]string, error) {
	params := make([]string, len(names))
	for i, n := range names {
		params[i] = n.Value
		for _, p := range params[:i] {
			if p == n.Value {
				return nil, &fault{at: n.Span(), name: "Invalid", reason: "the parameter " + p + " appears twice"}
			}
		}
	}
	return params, nil
}

func head(params []string) string {
	if len(params) == 1 {
		return params[0]
	}
	return "(" + strings.Join(params, ", ") + ")"
}
