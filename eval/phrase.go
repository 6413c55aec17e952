package eval

import (
	"fmt"
	"strings"

	"adjoin/algebra"
	"adjoin/eval/value"
	"adjoin/eval/vocabulary"
	"adjoin/lang"
)

// phrase evaluates a noun with its objects.
func (c *cell) phrase(x *lang.Phrase, span lang.Span) (value.Value, error) {
	words := strings.Join(x.Words, " ")
	e := vocabulary.Lookup(vocabulary.Noun, words)
	if e == nil {
		return nil, c.unknownPhrase(words, span)
	}
	return c.apply(e, x.Args)
}

// predicate evaluates X is P, or X verb Y.
func (c *cell) predicate(x *lang.Predicate) (value.Value, error) {
	words := strings.Join(x.Words, " ")
	class := vocabulary.Predicate
	if x.Verb {
		class = vocabulary.Verb
	}
	e := vocabulary.Lookup(class, words)
	if e == nil {
		return nil, c.unknownPredicate(words, x.Span())
	}
	v, err := c.apply(e, append([]lang.Arg{{X: x.X}}, x.Args...))
	if err != nil {
		return nil, err
	}
	verdict := v.(value.Verdict)
	if x.Not {
		verdict.Verdict = value.Not(verdict.Verdict)
	}
	verdict.Claim = func() string { return lang.Print(x) }
	return verdict, nil
}

// form evaluates X as FORM.
func (c *cell) form(x *lang.As) (value.Value, error) {
	words := strings.Join(x.Words, " ")
	e := vocabulary.Lookup(vocabulary.Form, words)
	if e == nil {
		return nil, c.unknownForm(words, x.Span())
	}
	return c.apply(e, append([]lang.Arg{{X: x.X}}, x.Args...))
}

// apply finds the case of an entry that takes the given arguments, and does
// it. Arguments are evaluated once, from left to right.
func (c *cell) apply(e *vocabulary.Entry, args []lang.Arg) (value.Value, error) {
	var fitting []vocabulary.Case
	var places [][]int // for each fitting case, which of its Args each argument is
	for _, k := range e.Cases {
		if p, ok := match(k, args); ok {
			fitting, places = append(fitting, k), append(places, p)
		}
	}
	if len(fitting) == 0 {
		return nil, misused(e, args)
	}
	values := make([]value.Value, len(args))
	for i, a := range args {
		v, err := c.eval(a.X)
		if err != nil {
			return nil, err
		}
		values[i] = v
	}
	furthest, wanted := -1, []string(nil)
	for n, k := range fitting {
		taken := make([]value.Value, len(k.Args))
		bad := -1
		given := values
		if last := len(args) - 1; last >= 0 && places[n][last] == elsewhere {
			moved, err := c.moveAll(args, values)
			if err != nil {
				return nil, err
			}
			given = moved
		}
		for i, v := range given {
			kind := k.Args[places[n][i]].Kind
			t, ok := kind.Take(c.ctx, v)
			if !ok {
				bad = i
				if i > furthest {
					furthest, wanted = i, nil
				}
				if i == furthest {
					wanted = append(wanted, kind.Name)
				}
				break
			}
			taken[places[n][i]] = t
		}
		if bad < 0 {
			return k.Do(c.ctx, taken)
		}
	}
	return nil, c.wrongKind(e, args[furthest], values[furthest], wanted)
}

// elsewhere stands for the parameter of a closing over K, which moves the
// other arguments and is none itself.
const elsewhere = -2

// moveAll moves the numbers, polynomials and lists of them among the values to
// the last one, which stands behind over.
func (c *cell) moveAll(args []lang.Arg, values []value.Value) ([]value.Value, error) {
	last := len(values) - 1
	moved := make([]value.Value, last)
	for i, v := range values[:last] {
		moved[i] = v
		if _, ok := value.AsNumber(v); !ok {
			switch value.Plain(v).(type) {
			case value.Collection, value.Matrix:
			default:
				continue
			}
		}
		w, err := value.Over(c.ctx, value.Plain(v), value.Plain(values[last]))
		if err != nil {
			return nil, at(args[i].X.Span(), err)
		}
		moved[i] = w
	}
	return moved, nil
}

// match says which parameter of a case each argument is, when all of them find
// one and no parameter that is needed is left over.
func match(k vocabulary.Case, args []lang.Arg) ([]int, bool) {
	params := k.Args
	places := make([]int, len(args))
	used := make([]bool, len(params))
	for i, a := range args {
		places[i] = -1
		role := strings.Join(a.Role, " ")
		for j, p := range params {
			if !used[j] && p.Prep == a.Prep && p.Role == role {
				places[i], used[j] = j, true
				break
			}
		}
		if places[i] < 0 && k.Over && i == len(args)-1 && a.Prep == "over" && role == "" {
			places[i] = elsewhere
		}
		if places[i] == -1 {
			return nil, false
		}
	}
	for j, p := range params {
		if !used[j] && !p.Optional {
			return nil, false
		}
	}
	return places, true
}

func misused(e *vocabulary.Entry, args []lang.Arg) error {
	given := e.Words
	for _, a := range args {
		if a.Prep != "" {
			given += " " + strings.Join(append([]string{a.Prep}, append(a.Role, "...")...), " ")
		}
	}
	return algebra.Errorf(algebra.Invalid, "%s does not fit the %s %s", given, e.Class, e.Words).
		WithRemedy("write %s", strings.Join(e.Signatures(), ", or "))
}

func (c *cell) wrongKind(e *vocabulary.Entry, a lang.Arg, v value.Value, wanted []string) error {
	var distinct []string
	for _, w := range wanted {
		if len(distinct) == 0 || distinct[len(distinct)-1] != w {
			distinct = append(distinct, w)
		}
	}
	place := a.Prep
	if len(a.Role) > 0 {
		place += " " + strings.Join(a.Role, " ")
	}
	reason := ""
	switch {
	case e.Class == vocabulary.Noun:
		reason = fmt.Sprintf("%s %s takes %s, not %s", e.Words, place, strings.Join(distinct, " or "), value.Plain(v).Kind())
	case e.Class == vocabulary.Form:
		reason = fmt.Sprintf("as %s shows %s, not %s", strings.TrimSpace(e.Words+" "+place), strings.Join(distinct, " or "), value.Plain(v).Kind())
	default:
		reason = fmt.Sprintf("%s is said of %s, not of %s", e.Words, strings.Join(distinct, " or "), value.Plain(v).Kind())
		if place != "" {
			reason = fmt.Sprintf("%s %s takes %s, not %s", e.Words, place, strings.Join(distinct, " or "), value.Plain(v).Kind())
		}
	}
	err := algebra.Errorf(algebra.Invalid, "%s", reason)
	if a.X.Span() == (lang.Span{}) { // the objects of a call, gathered by callNoun
		return err
	}
	return at(a.X.Span(), err)
}
