package vocabulary

import (
	"fmt"
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/integer"
	"adjoin/algebra/ratpoly"
	"adjoin/eval/value"
)

var numbers = []Entry{
	{
		Words: "gcd", Also: []string{"greatest common divisor"}, Class: Noun, Topic: "numbers",
		Meaning: "the greatest common divisor of integers or polynomials; monic over a field, positive in Z",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Several}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return fold(c, a[0].(value.Tuple).Items, value.GCD)
		}}},
		Examples: []Example{
			{"gcd of (84, 30)", "6"},
			{"gcd(x^6 - 1, x^4 - 1)", "x^2 - 1"},
			{"gcd of (x^2 + 1, x^3 + 1) over F_2", "x + 1 over F_2"},
		},
	},
	{
		Words: "lcm", Also: []string{"least common multiple"}, Class: Noun, Topic: "numbers",
		Meaning: "the least common multiple of integers or polynomials",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Several}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return fold(c, a[0].(value.Tuple).Items, value.LCM)
		}}},
		Examples: []Example{{"lcm of (4, 6, 10)", "60"}},
	},
	{
		Words: "Bezout coefficients", Also: []string{"Bézout coefficients"}, Class: Noun, Topic: "numbers",
		Meaning: "the tuple (d, u, v) with d = u*a + v*b, d the greatest common divisor of a and b",
		Source:  "D. E. Knuth, The Art of Computer Programming, volume 2, 1997, algorithm 4.5.2X",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Pair}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return value.Bezout(c, a[0].(value.Tuple).Items[0], a[0].(value.Tuple).Items[1])
		}}},
		Examples: []Example{{"Bezout coefficients of (12, 42)", "(6, -3, 1)"}, {"Bezout coefficients of (x^2 + 1, x) over F_3", "(1, 1, 2*x) over F_3[x]"}},
	},
	{
		Words: "factorization", Class: Noun, Topic: "numbers",
		Meaning: "an integer or polynomial as a unit times powers of irreducible factors",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, chapter 4",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Integer}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return factorInteger(c, a[0].(value.Integer).N)
			}},
			{Args: ofPolynomial, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return factorPolynomial(c, a[0])
			}},
		},
		Examples: []Example{
			{"factorization of 360", "2^3 * 3^2 * 5"},
			{"factorization of x^4 + x^2 + 1 over F_2", "(x^2 + x + 1)^2 over F_2"},
		},
	},
	{
		Words: "divisors", Class: Noun, Topic: "numbers",
		Meaning: "the positive divisors of an integer, in ascending order",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Integer}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			n := new(big.Int).Abs(a[0].(value.Integer).N)
			if n.Sign() == 0 {
				return nil, algebra.Errorf(algebra.Undefined, "every integer divides 0")
			}
			f, err := fullFactorization(c, n)
			if err != nil {
				return nil, err
			}
			count := big.NewInt(1)
			for _, pp := range f.Primes {
				count.Mul(count, big.NewInt(int64(pp.E+1)))
			}
			if err := c.CheckLength(count); err != nil {
				return nil, err
			}
			return integerList(integer.Divisors(f)), nil
		}}},
		Examples: []Example{{"divisors of 12", "[1, 2, 3, 4, 6, 12]"}},
	},
	{
		Words: "primes", Class: Noun, Topic: "numbers",
		Meaning: "the primes in a range",
		Cases: []Case{{Args: []Arg{{Prep: "in", Kind: Range}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return primesIn(c, a[0].(value.Range))
		}}},
		Examples: []Example{{"primes in 1..20", "[2, 3, 5, 7, 11, 13, 17, 19]"}},
	},
	{
		Words: "prime", Class: Predicate, Topic: "numbers",
		Meaning: "said of an integer n > 1 that only 1 and n divide; beyond 2^64 a positive answer is labelled probable",
		Source:  "R. Baillie and S. S. Wagstaff, Lucas pseudoprimes, 1980",
		Cases: []Case{{Args: []Arg{{Kind: Integer}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return verdict(integer.IsPrime(c.W, a[0].(value.Integer).N), nil)
		}}},
		Examples: []Example{{"2^61 - 1 is prime", "true"}, {"91 is prime", "false"}},
	},
	{
		Words: "cyclotomic polynomial", Class: Noun, Topic: "numbers",
		Meaning: "the polynomial whose roots are the primitive n-th roots of unity",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, definition 2.44",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Natural}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			n := a[0].(value.Integer).N
			if err := c.CheckDegree(n); err != nil {
				return nil, err
			}
			return value.Polynomial{P: ratpoly.Cyclotomic(c.W, int(n.Int64())), Letter: "x"}, nil
		}}},
		Examples: []Example{{"cyclotomic polynomial of 12", "x^4 - x^2 + 1"}},
	},
	{
		Words: "content", Class: Noun, Topic: "numbers",
		Meaning: "the greatest rational number that divides a polynomial over Q with an integer primitive quotient",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: RatPoly}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return value.NewRational(a[0].(value.Polynomial).P.Content()), nil
		}}},
		Examples: []Example{{"content of 6x^2 + 9", "3"}},
	},
	{
		Words: "inverse", Class: Noun, Topic: "numbers",
		Meaning: "what gives 1 when multiplied: of a number, of an integer in Z/n, of a matrix; the map that undoes an isomorphism",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Number}, {Prep: "in", Kind: AnyRing, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				x := a[0]
				if a[1] != nil {
					var err error
					if x, err = value.Over(c, x, a[1]); err != nil {
						return nil, err
					}
				}
				return value.Divide(c, value.Int(1), x)
			}},
			{Args: []Arg{{Prep: "of", Kind: Map}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				m, err := a[0].(value.Map).M.Inverse(c.W)
				if err != nil {
					return nil, err
				}
				return value.Map{M: m}, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Matrix}}, Over: true, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return a[0].(value.Matrix).Inverse(c)
			}},
		},
		Examples: []Example{{"inverse of 3 in Z/7", "5 over Z/7"}, {"inverse of g_16 in F_16", "g_16^3 + 1"}},
	},
}

// fold combines the items pairwise from the left.
func fold(c *value.Context, items []value.Value, f func(c *value.Context, a, b value.Value) (value.Value, error)) (value.Value, error) {
	r := items[0]
	if len(items) == 1 {
		return f(c, r, r)
	}
	for _, v := range items[1:] {
		var err error
		if r, err = f(c, r, v); err != nil {
			return nil, err
		}
	}
	return r, nil
}

func verdict(v algebra.Verdict, err error) (value.Value, error) {
	if err != nil {
		return nil, err
	}
	return value.Verdict{Verdict: v}, nil
}

func integerList(list []*big.Int) value.List {
	items := make([]value.Value, len(list))
	for i, n := range list {
		items[i] = value.Integer{N: n}
	}
	return value.List{Items: items}
}

func factorInteger(c *value.Context, n *big.Int) (value.Value, error) {
	if n.Sign() == 0 {
		return nil, algebra.Errorf(algebra.Undefined, "0 has no factorization")
	}
	f := integer.Factor(c.W, new(big.Int).Abs(n))
	r := value.Factorization{Of: value.Integer{N: n}}
	if n.Sign() < 0 {
		r.Unit = value.Int(-1)
	}
	for _, pp := range f.Primes {
		r.Factors = append(r.Factors, value.Factor{F: value.Integer{N: pp.P}, E: pp.E})
	}
	r.Evidence = algebra.Evidence{Standing: f.Standing, Reason: "each factor passed the test of primality"}
	if f.Cofactor != nil {
		r.Factors = append(r.Factors, value.Factor{F: value.Integer{N: f.Cofactor}, E: 1})
		if c.Warn != nil {
			c.Warn(fmt.Sprintf("the factor of %d digits is composite; no factor of it was found", len(f.Cofactor.String())))
		}
	}
	return r, nil
}

// fullFactorization is the factorization into primes, or an error that names
// what could not be split.
func fullFactorization(c *value.Context, n *big.Int) (integer.Factorization, error) {
	f := integer.Factor(c.W, n)
	if f.Cofactor != nil {
		return f, algebra.Errorf(algebra.Unable, "%s was not factored completely: a composite factor of %d digits is left", value.Short(n), len(f.Cofactor.String()))
	}
	return f, nil
}

// most primes are found by a sieve up to here, and one by one beyond.
const sieve = 1 << 24

func primesIn(c *value.Context, r value.Range) (value.Value, error) {
	if r.To.Cmp(big.NewInt(sieve)) <= 0 {
		var items []value.Value
		if r.To.Sign() > 0 {
			for _, p := range integer.PrimesUpTo(int(r.To.Int64())) {
				if big.NewInt(int64(p)).Cmp(r.From) >= 0 {
					items = append(items, value.Int(p))
				}
			}
		}
		return value.List{Items: items}, c.CheckLength(big.NewInt(int64(len(items))))
	}
	if err := c.CheckLength(r.Len()); err != nil {
		return nil, err
	}
	var items []value.Value
	for v, err := range r.All(c) {
		if err != nil {
			return nil, err
		}
		if integer.IsPrime(c.W, v.(value.Integer).N).Holds {
			items = append(items, v)
		}
	}
	return value.List{Items: items}, nil
}
