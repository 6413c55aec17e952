package vocabulary

import (
	"iter"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/eval/value"
)

var polynomials = []Entry{
	{
		Words: "degree", Class: Noun, Topic: "polynomials",
		Meaning: "the largest exponent of a polynomial; of a field over its prime field; of an extension",
		Cases: []Case{
			{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				n := 0
				switch f := a[0].(type) {
				case value.Polynomial:
					n = f.P.Degree()
				case value.FieldPolynomial:
					n = f.P.Degree()
				}
				if n < 0 {
					return nil, algebra.Errorf(algebra.Undefined, "the zero polynomial has no degree")
				}
				return value.Int(n), nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Extension}, {Prep: "over", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				e := a[0].(value.Extension)
				if a[1] != nil {
					return value.DegreeOver(c, value.Field{K: e.L}, a[1])
				}
				return value.Int(e.Degree()), nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Element}, {Prep: "over", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				f, err := minimalPolynomial(c, a[0].(value.Element), a[1])
				if err != nil {
					return nil, err
				}
				return value.Int(f.P.Degree()), nil
			}},
		},
		Examples: []Example{{"degree of x^5 - x - 1", "5"}, {"degree of F_256", "8"}, {"degree of F_256/F_4", "4"}},
	},
	{
		Words: "leading coefficient", Class: Noun, Topic: "polynomials",
		Meaning: "the coefficient of the largest power",
		Cases: []Case{{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			list := coefficients(a[0])
			if len(list) == 0 {
				return nil, algebra.Errorf(algebra.Undefined, "the zero polynomial has no leading coefficient")
			}
			return list[len(list)-1], nil
		}}},
		Examples: []Example{{"leading coefficient of 3x^2 + 1", "3"}},
	},
	{
		Words: "coefficients", Class: Noun, Topic: "polynomials",
		Meaning: "the list of the coefficients of a polynomial, constant term first",
		Cases: []Case{{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return value.List{Items: coefficients(a[0])}, nil
		}}},
		Examples: []Example{{"coefficients of x^3 - 2", "[-2, 0, 0, 1]"}},
	},
	{
		Words: "derivative", Class: Noun, Topic: "polynomials",
		Meaning: "the formal derivative of a polynomial or rational function; also written f'",
		Cases: []Case{
			{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				switch f := a[0].(type) {
				case value.Polynomial:
					return value.Polynomial{P: f.P.Derivative(), Letter: f.Letter}, nil
				case value.FieldPolynomial:
					return value.FieldPolynomial{P: f.P.Derivative(), Letter: f.Letter}, nil
				}
				return nil, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Fraction}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				u := a[0].(value.RationalFunction)
				return value.RationalFunction{F: u.F.Derivative(c.W), Letter: u.Letter}, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Quotient}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return a[0].(value.Quotient).Derivative(c), nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Scalar}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return value.Operate(c, "-", a[0], a[0])
			}},
		},
		Examples: []Example{{"derivative of x^3 + x", "3*x^2 + 1"}, {"(x^4 + x over F_2)'", "1 over F_2[x]"}},
	},
	{
		Words: "discriminant", Class: Noun, Topic: "polynomials",
		Meaning: "of a polynomial: zero exactly when it has a multiple root",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 1.92",
		Cases: []Case{{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			if isZeroOrConstant(a[0]) {
				return nil, algebra.Errorf(algebra.Undefined, "a constant polynomial has no discriminant")
			}
			switch f := a[0].(type) {
			case value.Polynomial:
				return value.NewRational(f.P.Discriminant(c.W)), nil
			case value.FieldPolynomial:
				return value.Element{E: f.P.Discriminant(c.W)}, nil
			}
			return nil, nil
		}}},
		Examples: []Example{{"discriminant of x^2 - 5", "20"}},
	},
	{
		Words: "resultant", Class: Noun, Topic: "polynomials",
		Meaning: "of two polynomials: zero exactly when they have a common root",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 1.93",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Pair}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			f, g, err := twoPolynomials(c, a[0].(value.Tuple).Items)
			if err != nil {
				return nil, err
			}
			switch f := f.(type) {
			case value.Polynomial:
				return value.NewRational(f.P.Resultant(c.W, g.(value.Polynomial).P)), nil
			case value.FieldPolynomial:
				return value.Element{E: f.P.Resultant(c.W, g.(value.FieldPolynomial).P)}, nil
			}
			return nil, nil
		}}},
		Examples: []Example{{"resultant of (x^2 - 2, x - 1)", "-1"}},
	},
	{
		Words: "quotient", Class: Noun, Topic: "polynomials",
		Meaning: "what division with remainder gives",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Number}, {Prep: "by", Kind: Number}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			q, _, err := value.Division(c, a[0], a[1])
			return q, err
		}}},
		Examples: []Example{{"quotient of x^3 + 1 by x - 1", "x^2 + x + 1"}, {"quotient of 17 by 5", "3"}},
	},
	{
		Words: "remainder", Class: Noun, Topic: "polynomials",
		Meaning: "what division leaves over; also written f mod g",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Number}, {Prep: "by", Kind: Number}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return value.Remainder(c, a[0], a[1])
		}}},
		Examples: []Example{{"remainder of x^3 + 1 by x - 1", "2"}, {"remainder of 17 by 5", "2"}},
	},
	{
		Words: "irreducible factors", Class: Noun, Topic: "polynomials",
		Meaning: "the distinct irreducible factors: monic over a field, primitive with positive leading coefficient over Q",
		Cases: []Case{{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			v, err := factorPolynomial(c, a[0])
			if err != nil {
				return nil, err
			}
			n := &value.Notes{Caption: "Irreducible factors", Heads: []string{"factor", "degree", "multiplicity"}}
			var items []value.Value
			for _, g := range v.Factors {
				items = append(items, g.F)
				n.Rows = append(n.Rows, []value.Value{g.F, value.Int(len(coefficients(g.F)) - 1), value.Int(g.E)})
			}
			return value.List{Items: items, Notes: n}, nil
		}}},
		Examples: []Example{{"irreducible factors of x^4 - 1 over F_3", "[x + 1, x + 2, x^2 + 1] over F_3"}},
	},
	{
		Words: "multiplicity", Class: Noun, Topic: "polynomials",
		Meaning:  "how often one polynomial, or one root, is a factor of another",
		Cases:    []Case{{Args: []Arg{{Prep: "of", Kind: Number}, {Prep: "in", Kind: Polynomial}}, Over: true, Do: multiplicity}},
		Examples: []Example{{"multiplicity of x + 1 in (x^2 + 1)*(x^3 + x^2) over F_2", "3"}},
	},
	{
		Words: "roots", Class: Noun, Topic: "polynomials",
		Meaning: "the distinct roots of a polynomial in a finite field, in canonical order; shown with their multiplicities",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Polynomial}, {Prep: "in", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			f := a[0]
			if a[1] != nil {
				var err error
				if f, err = value.Over(c, f, a[1]); err != nil {
					return nil, err
				}
			}
			g, ok := f.(value.FieldPolynomial)
			if !ok {
				return nil, algebra.Errorf(algebra.Unable, "roots are found in finite fields only so far").WithRemedy("say where: roots of f in F_7")
			}
			if g.P.IsZero() {
				return nil, algebra.Errorf(algebra.Undefined, "everything is a root of the zero polynomial")
			}
			n := &value.Notes{Caption: "Roots", Heads: []string{"root", "multiplicity"}}
			var items []value.Value
			for _, r := range g.P.Roots(c.W) {
				items = append(items, value.Element{E: r.A})
				n.Rows = append(n.Rows, []value.Value{value.Element{E: r.A}, value.Int(r.E)})
			}
			if len(items) == 0 {
				K := g.P.Field()
				n.Note = "there is none: it has no common factor with x^q - x, where q = " + value.Short(K.Order())
			}
			return value.List{Items: items, Notes: n}, nil
		}}},
		Examples: []Example{{"roots of x^2 - 2 in F_7", "[3, 4]"}, {"roots of x^2 + x + 1 in F_4", "[g_4, g_4 + 1]"}},
	},
	{
		Words: "real roots", Class: Noun, Topic: "polynomials",
		Meaning: "the distinct real roots of a polynomial over Q; they are counted, not listed",
		Source:  "C. Sturm, Mémoire sur la résolution des équations numériques, 1829",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: RatPoly}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return realRoots(c, a[0].(value.Polynomial))
		}}},
		Examples: []Example{{"number of real roots of x^5 - 5*x + 12", "1"}, {"number of real roots of (x^2 - 2)^2", "2"}},
	},
	{
		Words: "degree of inseparability", Class: Noun, Topic: "polynomials",
		Meaning: "the largest power p^e of the characteristic such that the polynomial is one in x^(p^e); 1 in characteristic 0",
		Cases: []Case{{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return inseparability(a[0])
		}}},
		Examples: []Example{{"degree of inseparability of x^9 + x^3 + 1 over F_3", "3"}},
	},
	{
		Words: "splitting field", Class: Noun, Topic: "polynomials",
		Meaning: "the smallest field over which a polynomial is a product of linear factors, in its standard presentation",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 1.90",
		Cases: []Case{{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			f, err := finitePolynomial(a[0])
			if err != nil {
				return nil, err
			}
			return splittingField(c, f)
		}}},
		Examples: []Example{{"splitting field of (x^2 + x + 1)*(x^3 + x + 1) over F_2", "F_64"}},
	},
	{
		Words: "reciprocal", Class: Noun, Topic: "polynomials",
		Meaning: "the polynomial with the coefficients in reverse order, x^n f(1/x)",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 3.12",
		Cases: []Case{{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return reciprocal(a[0]), nil
		}}},
		Examples: []Example{{"reciprocal of x^4 + x + 1", "x^4 + x^3 + 1"}},
	},
	{
		Words: "irreducible polynomials", Class: Noun, Topic: "polynomials",
		Meaning: "the monic irreducible polynomials of a degree over a finite field, in canonical order",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 3.25 (their number)",
		Cases: []Case{{Args: []Arg{{Prep: "of", Role: "degree", Kind: Natural}, {Prep: "over", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			K := a[1].(value.Field).K
			return polynomialsWith(c, a, "irreducible", func(n int) (*big.Int, error) {
				return field.CountIrreducible(K.Order(), n), nil
			}, func(c *value.Context, n int) (iter.Seq[field.Polynomial], error) {
				return field.IrreduciblePolynomials(c.W, K, n), nil
			})
		}}},
		Examples: []Example{
			{"number of irreducible polynomials of degree 8 over F_2", "30"},
			{"[f for f in irreducible polynomials of degree 3 over F_2]", "[x^3 + x + 1, x^3 + x^2 + 1] over F_2"},
		},
	},
	{
		Words: "primitive polynomials", Class: Noun, Topic: "polynomials",
		Meaning: "the monic polynomials of a degree whose roots generate the multiplicative group of the extension, in canonical order",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 3.15",
		Cases: []Case{{Args: []Arg{{Prep: "of", Role: "degree", Kind: Natural}, {Prep: "over", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			K := a[1].(value.Field).K
			return polynomialsWith(c, a, "primitive", func(n int) (*big.Int, error) {
				return field.CountPrimitive(c.W, K, n)
			}, func(c *value.Context, n int) (iter.Seq[field.Polynomial], error) {
				return field.PrimitivePolynomials(c.W, K, n)
			})
		}}},
		Examples: []Example{{"number of primitive polynomials of degree 8 over F_2", "16"}},
	},
	{
		Words: "irreducible", Class: Predicate, Topic: "polynomials",
		Meaning: "said of a polynomial of positive degree that is not a product of two of smaller degree",
		Source:  "M. O. Rabin, Probabilistic algorithms in finite fields, 1980",
		Cases: []Case{{Args: []Arg{{Kind: Polynomial}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			switch f := a[0].(type) {
			case value.FieldPolynomial:
				return verdict(f.P.IsIrreducible(c.W), nil)
			case value.Polynomial:
				return verdict(f.P.IsIrreducible(c.W), nil)
			}
			return nil, nil
		}}},
		Examples: []Example{{"x^8 + x^4 + x^3 + x^2 + 1 is irreducible over F_2", "true"}, {"x^4 + x^2 + 1 is irreducible over F_2", "false"}},
	},
	{
		Words: "primitive", Class: Predicate, Topic: "polynomials",
		Meaning: "of a polynomial: a root of it generates the multiplicative group; of an element: it does so itself, in K",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 3.15",
		Cases: []Case{
			{Args: []Arg{{Kind: Element}, {Prep: "in", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				x := a[0].(value.Element)
				if a[1] != nil {
					var err error
					if x, err = value.ToField(c, x, a[1].(value.Field).K); err != nil {
						return nil, err
					}
				}
				v, err := x.E.IsPrimitive(c.W)
				return verdict(v, err)
			}},
			{Args: []Arg{{Kind: Integer}, {Prep: "in", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				x, err := value.ToField(c, a[0], a[1].(value.Field).K)
				if err != nil {
					return nil, err
				}
				v, err := x.E.IsPrimitive(c.W)
				return verdict(v, err)
			}},
			{Args: []Arg{{Kind: Polynomial}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				f, err := finitePolynomial(a[0])
				if err != nil {
					return nil, err
				}
				v, err := f.P.IsPrimitive(c.W)
				return verdict(v, err)
			}},
		},
		Examples: []Example{{"x^8 + x^4 + x^3 + x^2 + 1 is primitive over F_2", "true"}, {"g_16^3 is primitive in F_16", "false"}},
	},
	{
		Words: "squarefree", Class: Predicate, Topic: "polynomials",
		Meaning:  "said of a polynomial that no square of a polynomial of positive degree divides",
		Cases:    []Case{{Args: []Arg{{Kind: Polynomial}}, Over: true, Do: squarefree}},
		Examples: []Example{{"x^2 + 1 is squarefree over F_2", "false"}, {"x^2 + 1 is squarefree", "true"}},
	},
	{
		Words: "separable", Class: Predicate, Topic: "polynomials",
		Meaning: "of a polynomial: no multiple root in any extension; of an extension of finite fields: always",
		Cases: []Case{
			{Args: []Arg{{Kind: Polynomial}}, Over: true, Do: squarefree},
			{Args: []Arg{{Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return verdict(algebra.Because(true, "finite fields are perfect: x |-> x^p is onto"), nil)
			}},
		},
		Examples: []Example{{"x^3 - 1 is separable over F_3", "false"}},
	},
}

var ofPolynomial = []Arg{{Prep: "of", Kind: Polynomial}}

// finitePolynomial is f as a polynomial over a finite field, or the advice to
// say which.
func finitePolynomial(f value.Value) (value.FieldPolynomial, error) {
	g, ok := f.(value.FieldPolynomial)
	if !ok {
		return g, algebra.Errorf(algebra.Invalid, "that is asked of polynomials over a finite field, and this one has rational coefficients").
			WithRemedy("say the field: ... over F_2")
	}
	return g, nil
}

func coefficients(f value.Value) []value.Value {
	var list []value.Value
	switch f := f.(type) {
	case value.Polynomial:
		for _, q := range f.P.Coefficients() {
			list = append(list, value.NewRational(q))
		}
	case value.FieldPolynomial:
		for _, e := range f.P.Coefficients() {
			list = append(list, value.Element{E: e})
		}
	}
	return list
}

func isZeroOrConstant(f value.Value) bool { return len(coefficients(f)) <= 1 }

func twoPolynomials(c *value.Context, pair []value.Value) (f, g value.Value, err error) {
	f, g, err = value.Meet(c, pair[0], pair[1])
	if err != nil {
		return nil, nil, err
	}
	switch f.(type) {
	case value.Polynomial, value.FieldPolynomial:
		return f, g, nil
	}
	return nil, nil, algebra.Errorf(algebra.Invalid, "that is asked of two polynomials, not of %s and %s", pair[0].Kind(), pair[1].Kind())
}

func factorPolynomial(c *value.Context, f value.Value) (value.Factorization, error) {
	if len(coefficients(f)) == 0 {
		return value.Factorization{}, algebra.Errorf(algebra.Undefined, "0 has no factorization")
	}
	r := value.Factorization{Of: f}
	switch f := f.(type) {
	case value.FieldPolynomial:
		unit, factors := f.P.Factor(c.W)
		if !unit.Equal(f.P.Field().One()) || len(factors) == 0 {
			r.Unit = value.Element{E: unit}
		}
		for _, g := range factors {
			r.Factors = append(r.Factors, value.Factor{F: value.FieldPolynomial{P: g.F, Letter: f.Letter}, E: g.E})
		}
	case value.Polynomial:
		unit, factors := f.P.Factor(c.W)
		if unit.Cmp(big.NewRat(1, 1)) != 0 || len(factors) == 0 {
			r.Unit = value.NewRational(unit)
		}
		for _, g := range factors {
			r.Factors = append(r.Factors, value.Factor{F: value.Polynomial{P: g.F, Letter: f.Letter}, E: g.E})
		}
	}
	return r, nil
}

// multiplicity is how often the factor, or x - r for a root r, divides f.
func multiplicity(c *value.Context, a []value.Value) (value.Value, error) {
	factor, dividend := a[0], a[1]
	f, g, err := value.Meet(c, dividend, factor)
	if err != nil {
		return nil, err
	}
	if len(coefficients(f)) == 0 {
		return nil, algebra.Errorf(algebra.Undefined, "everything divides the zero polynomial any number of times")
	}
	if len(coefficients(g)) < 2 { // a root r: the factor is x - r
		letter := "x"
		switch f := f.(type) {
		case value.Polynomial:
			letter = f.Letter
		case value.FieldPolynomial:
			letter = f.Letter
		}
		d, err := value.Operate(c, "-", value.Indeterminate(letter), factor)
		if err != nil {
			return nil, err
		}
		if f, g, err = value.Meet(c, f, d); err != nil {
			return nil, err
		}
	}
	for n := 0; ; n++ {
		c.W.Poll()
		q, r, err := value.Division(c, f, g)
		if err != nil {
			return nil, err
		}
		if len(coefficients(r)) > 0 {
			return value.Int(n), nil
		}
		f = q
	}
}

func splittingField(c *value.Context, f value.FieldPolynomial) (value.Value, error) {
	if f.P.IsZero() {
		return nil, algebra.Errorf(algebra.Undefined, "the zero polynomial has no splitting field")
	}
	K := f.P.Field()
	degree := 1
	_, factors := f.P.Factor(c.W)
	for _, g := range factors {
		degree = lcm(degree, g.F.Degree())
		if degree*K.AbsoluteDegree() > value.MaxFieldDegree {
			return nil, algebra.Errorf(algebra.TooLarge, "the splitting field has a degree over %d", value.MaxFieldDegree)
		}
	}
	if degree == 1 {
		return value.Field{K: K}, nil
	}
	return value.StandardField(c, K.Characteristic(), big.NewInt(int64(degree*K.AbsoluteDegree())))
}

// realRoots counts by the changes of sign in Sturm's chain at the two ends of
// the line.
func realRoots(c *value.Context, f value.Polynomial) (value.Value, error) {
	if f.P.IsZero() {
		return nil, algebra.Errorf(algebra.Undefined, "every number is a root of the zero polynomial")
	}
	before, after := 0, 0
	signBefore, signAfter := 0, 0
	for p, q := f.P, f.P.Derivative(); !p.IsZero(); {
		c.W.Poll()
		lead := p.Coefficients()[p.Degree()].Sign()
		left := lead
		if p.Degree()%2 == 1 {
			left = -lead
		}
		if signBefore*left < 0 {
			before++
		}
		if signAfter*lead < 0 {
			after++
		}
		signBefore, signAfter = left, lead
		if q.IsZero() {
			break
		}
		_, r := p.DivRem(c.W, q)
		p, q = q, r.Neg()
	}
	return value.Lazy{
		Source: func(p *value.Printer) string { return "real roots of " + f.Text(p) },
		Count:  big.NewInt(int64(before - after)),
		Members: func(*value.Context) iter.Seq2[value.Value, error] {
			return func(yield func(value.Value, error) bool) {
				yield(nil, algebra.Errorf(algebra.Unable, "real roots are counted, not listed").WithRemedy("write number of real roots of f"))
			}
		},
	}, nil
}

func inseparability(f value.Value) (value.Value, error) {
	g, ok := f.(value.FieldPolynomial)
	if !ok {
		return value.Int(1), nil
	}
	if g.P.Degree() < 1 {
		return nil, algebra.Errorf(algebra.Undefined, "a constant polynomial has no degree of inseparability")
	}
	step := 0 // the greatest common divisor of the exponents
	for i, e := range g.P.Coefficients() {
		if !e.IsZero() {
			step = gcd(i, step)
		}
	}
	power, p := big.NewInt(1), g.P.Field().Characteristic()
	for next := new(big.Int).Mul(power, p); new(big.Int).Mod(big.NewInt(int64(step)), next).Sign() == 0; next = new(big.Int).Mul(next, p) {
		power = next
	}
	return value.Integer{N: power}, nil
}

func gcd(a, b int) int {
	for b != 0 {
		a, b = b, a%b
	}
	return a
}

func lcm(a, b int) int { return a / gcd(a, b) * b }

func reciprocal(f value.Value) value.Value {
	switch f := f.(type) {
	case value.Polynomial:
		return value.Polynomial{P: f.P.Reverse(), Letter: f.Letter}
	case value.FieldPolynomial:
		return value.FieldPolynomial{P: f.P.Reverse(), Letter: f.Letter}
	}
	return f
}

// squarefree decides whether no factor is repeated; over the perfect fields at
// hand that is the same as having no multiple root.
func squarefree(c *value.Context, a []value.Value) (value.Value, error) {
	if len(coefficients(a[0])) == 0 {
		return nil, algebra.Errorf(algebra.Undefined, "every polynomial divides 0")
	}
	f, ok := a[0].(value.Polynomial)
	if !ok {
		return verdict(a[0].(value.FieldPolynomial).P.IsSquarefree(c.W), nil)
	}
	g := value.Polynomial{P: f.P.GCD(c.W, f.P.Derivative()), Letter: f.Letter}
	v := algebra.Because(true, "it has no common factor with its derivative")
	if g.P.Degree() > 0 {
		v = algebra.Because(false, "%s divides it and its derivative", g.Text(nil))
	}
	return verdict(v, nil)
}

// quickBits bounds the number of bits of q^n up to which the first polynomials
// of degree n over F_q are found in no time.
const quickBits = 16

// polynomialsWith lists the polynomials of a degree with a property, which
// count and list know.
func polynomialsWith(c *value.Context, a []value.Value, word string, count func(n int) (*big.Int, error), list func(c *value.Context, n int) (iter.Seq[field.Polynomial], error)) (value.Value, error) {
	degree, K := a[0].(value.Integer).N, a[1].(value.Field).K
	if err := c.CheckDegree(degree); err != nil {
		return nil, err
	}
	n := int(degree.Int64())
	if err := c.CheckBits(float64(K.Order().BitLen()) * float64(n)); err != nil {
		return nil, err
	}
	total, err := count(n)
	if err != nil {
		return nil, err
	}
	return value.Lazy{
		Source: func(p *value.Printer) string {
			return word + " polynomials of degree " + degree.String() + " over " + value.RingName(p, a[1])
		},
		Count: total,
		Quick: K.Order().BitLen()*n <= quickBits,
		Members: func(c *value.Context) iter.Seq2[value.Value, error] {
			return func(yield func(value.Value, error) bool) {
				polynomials, err := list(c, n)
				if err != nil {
					yield(nil, err)
					return
				}
				for f := range polynomials {
					if !yield(value.FieldPolynomial{P: f, Letter: "x"}, nil) {
						return
					}
				}
			}
		},
	}, nil
}
