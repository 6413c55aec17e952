package vocabulary

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/field"
	"adjoin/algebra/funcfield"
	"adjoin/eval/value"
)

var fields = []Entry{
	{
		Words: "Z", Class: Constant, Topic: "fields and rings", Value: value.Integers,
		Meaning:  "the ring of integers; Z/n is the ring of residues modulo n",
		Examples: []Example{{"5/2 in Z", "false"}, {"(3 over Z/12) * 8", "0 over Z/12"}},
	},
	{
		Words: "Q", Class: Constant, Topic: "fields and rings", Value: value.Rationals,
		Meaning:  "the field of rational numbers",
		Examples: []Example{{"5/2 in Q", "true"}},
	},
	{
		Words: "characteristic", Class: Noun, Topic: "fields and rings",
		Meaning: "the least positive n with 1 + ... + 1 (n times) = 0, or 0 when there is none",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: AnyRing}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return characteristic(a[0]), nil
		}}},
		Examples: []Example{{"characteristic of F_81", "3"}, {"characteristic of Q", "0"}},
	},
	{
		Words: "prime field", Class: Noun, Topic: "fields and rings",
		Meaning: "the smallest subfield of a field",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: AnyRing}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			switch p := characteristic(a[0]).(value.Integer).N; {
			case p.Sign() == 0:
				return value.Rationals, nil
			default:
				return value.StandardField(c, p, big.NewInt(1))
			}
		}}},
		Examples: []Example{{"prime field of F_256", "F_2"}},
	},
	{
		Words: "defining polynomial", Class: Noun, Topic: "fields and rings",
		Meaning: "the irreducible polynomial over the base field whose root generates the field",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			K := a[0].(value.Field).K
			if K.IsPrime() {
				return nil, algebra.Errorf(algebra.Undefined, "a prime field is not defined by a polynomial: 1 generates it")
			}
			return value.FieldPolynomial{P: K.Modulus(), Letter: "x"}, nil
		}}},
		Examples: []Example{{"defining polynomial of F_4", "x^2 + x + 1 over F_2"}},
	},
	{
		Words: "standard generator", Also: []string{"generator"}, Class: Noun, Topic: "fields and rings",
		Meaning: "the element in which the other elements of a finite field are written; the generator of a cyclic group",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return value.Element{E: a[0].(value.Field).K.Generator()}, nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Group}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return a[0].(value.Group).Generator(c)
			}},
		},
		Examples: []Example{{"standard generator of F_9", "g_9"}},
	},
	{
		Words: "subfields", Class: Noun, Topic: "fields and rings",
		Meaning: "the subfields of a finite field by ascending degree, each with a generator; of L/K: the fields between K and L",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.6",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			l, err := value.NewLattice(c, a[0].(value.Extension))
			if err != nil {
				return nil, err
			}
			return l.List(), nil
		}}},
		Examples: []Example{{"[number of elements of K for K in subfields of F_{2^12}]", "[2, 4, 8, 16, 64, 4096]"}, {"number of subfields of F_{2^60}", "12"}},
	},
	{
		Words: "maximal subfields", Class: Noun, Topic: "fields and rings",
		Meaning: "the subfields that lie directly below a finite field: those of prime index",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[0].(value.Extension)
			l, err := value.NewLattice(c, e)
			if err != nil {
				return nil, err
			}
			all, keep := l.List(), map[int]bool{}
			for i, s := range l.Subs {
				r := e.L.AbsoluteDegree() / s.Field.AbsoluteDegree()
				keep[i] = r > 1 && primeInt(r)
			}
			return all.Keep(func(i int) bool { return keep[i] }), nil
		}}},
		Examples: []Example{{"[degree of K for K in maximal subfields of F_{2^12}]", "[4, 6]"}},
	},
	{
		Words: "lattice", Class: Noun, Topic: "fields and rings",
		Meaning: "the fields between K and L with their inclusions, drawn as a diagram with the degrees on the edges",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return value.NewLattice(c, a[0].(value.Extension))
		}}},
		Examples: []Example{{"let l = lattice of F_64/F_2; number of subfields of F_64/F_2", "4"}},
	},
	{
		Words: "compositum", Class: Noun, Topic: "fields and rings",
		Meaning: "the smallest field that contains the given ones",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Several}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return combine(c, a[0].(value.Tuple), lcm)
		}}},
		Examples: []Example{{"compositum of (F_4, F_8)", "F_64"}},
	},
	{
		Words: "intersection", Class: Noun, Topic: "fields and rings",
		Meaning: "the largest field that lies in all the given ones",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Several}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return combine(c, a[0].(value.Tuple), gcd)
		}}},
		Examples: []Example{{"intersection of (F_{2^6}, F_{2^4})", "F_4"}},
	},
	{
		Words: "dimension", Class: Noun, Topic: "fields and rings",
		Meaning: "the degree of L/K: the number of elements of a basis of L over K",
		Cases: []Case{{Args: []Arg{{Prep: "of", Kind: Extension}, {Prep: "over", Kind: Field, Optional: true}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[0].(value.Extension)
			if a[1] != nil {
				return value.DegreeOver(c, value.Field{K: e.L}, a[1])
			}
			return value.Int(e.Degree()), nil
		}}},
		Examples: []Example{{"dimension of F_256 over F_4", "4"}},
	},
	{
		Words: "elements", Class: Noun, Topic: "fields and rings",
		Meaning: "the elements of a finite field in canonical order, the automorphisms in a group, the members of a list or set",
		Cases: []Case{
			{Args: []Arg{{Prep: "of", Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return value.Elements(a[0].(value.Field)), nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Ring}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return value.Residues(a[0].(value.Ring)), nil
			}},
			{Args: []Arg{{Prep: "of", Kind: Collection}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				items, err := value.Members(c, a[0].(value.Collection))
				return value.List{Items: items}, err
			}},
		},
		Examples: []Example{{"[a for a in elements of F_4]", "[0, 1, g_4, g_4 + 1]"}, {"number of elements of F_{2^100}", "1267650600228229401496703205376"}},
	},
	{
		Words: "field", Class: Predicate, Topic: "fields and rings",
		Meaning: "said of a ring in which everything but 0 has an inverse",
		Cases: []Case{{Args: []Arg{{Kind: AnyRing}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return isField(c, a[0])
		}}},
		Examples: []Example{{"F_8 is a field", "true"}, {"Z/12 is a field", "false"}},
	},
	{
		Words: "perfect", Class: Predicate, Topic: "fields and rings",
		Meaning: "said of a field of characteristic 0, or of characteristic p when x |-> x^p is onto",
		Cases: []Case{
			{Args: []Arg{{Kind: Field}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return verdict(algebra.Because(true, "x |-> x^p is one-to-one, and the field is finite"), nil)
			}},
			{Args: []Arg{{Kind: FunField}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				return verdict(funcfield.FrobeniusIsOnto(a[0].(value.FunctionField).K), nil)
			}},
			{Args: []Arg{{Kind: Ring}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
				if a[0].(value.Ring).Name == "Q" {
					return verdict(algebra.Because(true, "its characteristic is 0"), nil)
				}
				return nil, algebra.Errorf(algebra.Invalid, "perfect is said of fields")
			}},
		},
		Examples: []Example{{"F_9 is perfect", "true"}, {"F_2(t) is perfect", "false"}},
	},
	{
		Words: "subfield of", Class: Predicate, Topic: "fields and rings",
		Meaning: "K is a subfield of L when it lies in L along the fixed embeddings; also written K <= L",
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.6",
		Cases: []Case{{Args: []Arg{{Kind: Field}, {Kind: Field.named("L")}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return verdict(value.Subfield(c, a[0].(value.Field), a[1].(value.Field)))
		}}},
		Examples: []Example{{"F_4 is a subfield of F_8", "false"}, {"F_4 is a subfield of F_16", "true"}},
	},
	{
		Words: "embeds in", Class: Verb, Topic: "fields and rings",
		Meaning: "K embeds in L when there is a homomorphism from K to L",
		Cases: []Case{{Args: []Arg{{Kind: Field}, {Kind: Field.named("L")}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return verdict(value.Subfield(c, a[0].(value.Field), a[1].(value.Field)))
		}}},
		Examples: []Example{{"F_4 embeds in F_16", "true"}, {"F_4 does not embed in F_8", "true"}},
	},
	{
		Words: "isomorphic to", Class: Predicate, Topic: "fields and rings",
		Meaning: "K is isomorphic to L: for finite fields, when they have equally many elements",
		Source:  "E. H. Moore, A doubly-infinite system of simple groups, 1893",
		Cases: []Case{{Args: []Arg{{Kind: Field}, {Kind: Field.named("L")}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			K, L := a[0].(value.Field).K, a[1].(value.Field).K
			return verdict(algebra.Because(K.Order().Cmp(L.Order()) == 0, "finite fields are isomorphic exactly when they have equally many elements; here %s^%d and %s^%d",
				K.Characteristic(), K.AbsoluteDegree(), L.Characteristic(), L.AbsoluteDegree()), nil)
		}}},
		Examples: []Example{{"F_2(a) where a^3 = a + 1 is isomorphic to F_8", "true"}},
	},
	alwaysTrue("normal", "every irreducible polynomial over K with one root in L splits in L"),
	alwaysTrue("Galois", "L/K is normal and separable"),
	alwaysTrue("abelian", "Gal(L/K) is commutative"),
	alwaysTrue("cyclic", "Gal(L/K) is generated by one automorphism"),
	alwaysTrue("solvable", "Gal(L/K) has a chain of normal subgroups with abelian quotients"),
}

// alwaysTrue is a property that every extension of finite fields has, because
// Frobenius generates its group.
func alwaysTrue(word, meaning string) Entry {
	e := Entry{
		Words: word, Class: Predicate, Topic: "fields and rings",
		Meaning: "said of an extension: " + meaning,
		Source:  "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.21",
		Cases: []Case{{Args: []Arg{{Kind: Extension}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			e := a[0].(value.Extension)
			return verdict(algebra.Because(true, "the Frobenius automorphism generates Gal(L/K), which is cyclic of order [L : K] = %d", e.Degree()), nil)
		}}},
		Examples: []Example{{"F_64/F_4 is " + word, "true"}},
	}
	if word == "abelian" || word == "cyclic" || word == "solvable" {
		e.Meaning = "said of a group, or of an extension L/K: " + meaning
		e.Cases = append(e.Cases, Case{Args: []Arg{{Kind: Group}}, Do: func(c *value.Context, a []value.Value) (value.Value, error) {
			return verdict(algebra.Because(true, "a power of the Frobenius automorphism generates the group"), nil)
		}})
	}
	if word == "normal" {
		e.Meaning = "said of an extension: " + meaning + "; of an element: its conjugates form a basis of L/K"
		e.Cases = append(e.Cases, normalElementCase)
	}
	return e
}

func characteristic(R value.Value) value.Value {
	switch R := R.(type) {
	case value.Field:
		return value.Integer{N: R.K.Characteristic()}
	case value.FunctionField:
		return value.Integer{N: R.K.Characteristic()}
	case value.PolynomialRing:
		return characteristic(R.Over)
	case value.Ring:
		if R.Modulus != nil {
			return value.Integer{N: R.Modulus}
		}
	}
	return value.Int(0)
}

func isField(c *value.Context, R value.Value) (value.Value, error) {
	switch R := R.(type) {
	case value.Field:
		if R.K.IsPrime() {
			v := R.K.Standing()
			v.Reason = "Z/p is a field exactly when p is prime; " + v.Reason
			return value.Verdict{Verdict: algebra.Verdict{Holds: true, Evidence: v}}, nil
		}
		v := R.K.Modulus().IsIrreducible(c.W)
		v.Evidence.Reason = "its defining polynomial is irreducible: " + v.Evidence.Reason
		return verdict(v, nil)
	case value.FunctionField:
		return verdict(algebra.Because(true, "the fractions over an integral domain form a field"), nil)
	case value.PolynomialRing:
		return verdict(algebra.Because(false, "%s has no inverse: degrees add in products", R.Letter), nil)
	case value.Ring:
		switch {
		case R.Name == "Q":
			return verdict(algebra.Because(true, "a/b with a not 0 has the inverse b/a"), nil)
		case R.Name == "Z":
			return verdict(algebra.Because(false, "2 has no inverse"), nil)
		}
		v := R.IsPrimeModulus(c)
		v.Evidence.Reason = "Z/n is a field exactly when n is prime; " + v.Evidence.Reason
		return verdict(v, nil)
	}
	return nil, algebra.Errorf(algebra.Unable, "whether %s is a field is not decided here", R.Kind())
}

// combine is the standard field whose degree comes from the degrees of the
// given ones; one of them is returned itself when it has that degree.
func combine(c *value.Context, t value.Tuple, degree func(a, b int) int) (value.Value, error) {
	var K *field.Field
	n := 0
	for _, v := range t.Items {
		f, ok := value.Plain(v).(value.Field)
		if !ok {
			return nil, algebra.Errorf(algebra.Invalid, "that is asked of finite fields, not of %s", v.Kind())
		}
		switch {
		case K == nil:
			K, n = f.K, f.K.AbsoluteDegree()
		case K.Characteristic().Cmp(f.K.Characteristic()) != 0:
			return nil, algebra.Errorf(algebra.Mismatch, "fields of the characteristics %s and %s lie in no common field", K.Characteristic(), f.K.Characteristic())
		default:
			n = degree(n, f.K.AbsoluteDegree())
		}
	}
	for _, v := range t.Items {
		if f := value.Plain(v).(value.Field); f.K.AbsoluteDegree() == n {
			return f, nil
		}
	}
	return value.StandardField(c, K.Characteristic(), big.NewInt(int64(n)))
}

func primeInt(n int) bool { return big.NewInt(int64(n)).ProbablyPrime(0) }
