package value

import (
	"fmt"
	"math/big"
	"strings"

	"adjoin/algebra"
	"adjoin/algebra/field"
)

// Map is a homomorphism between finite fields.
type Map struct{ M *field.Map }

func (s Map) Kind() string {
	if s.isEndomorphism() {
		return "an automorphism of " + orderText(s.M.From())
	}
	return "a homomorphism of fields"
}

func (s Map) isEndomorphism() bool { return field.Same(s.M.From(), s.M.To()) }

// Text is a form that evaluates to the map: by the image of the generator when
// that has a name, and otherwise through the Frobenius automorphism and the
// fixed embedding.
func (s Map) Text(p *Printer) string { return withRing(p, s) }

func (s Map) overText(p *Printer) (bare, ring string) {
	K, L := s.M.From(), s.M.To()
	if s.isEndomorphism() { // under the name that the target has for its generator
		K = L
	}
	// The image says where the map goes when it shows the generator of L.
	image := elementText(p, s.M.Image())
	if named(K) && s.fixesBase() && (s.isEndomorphism() || strings.Contains(image, generatorText(L))) {
		return "(" + K.Name() + " |-> " + image + ")", operandName(p, K)
	}
	if s.isEndomorphism() {
		return powerOfFrobenius(p, L, s.exponent()), ""
	}
	bare = fmt.Sprintf("(embedding from %s to %s)", operandName(p, K), operandName(p, L))
	if k := s.twist(); k != 0 {
		bare = powerOfFrobenius(p, L, k) + " * " + bare
	}
	return bare, ""
}

func powerOfFrobenius(p *Printer, L *field.Field, k int) string {
	if k == 1 {
		return fmt.Sprintf("(Frobenius of %s/F_%s)", operandName(p, L), L.Characteristic())
	}
	return fmt.Sprintf("(Frobenius of %s/F_%s)^%d", operandName(p, L), L.Characteristic(), k)
}

// exponent is the k with s(x) = x^(p^k), 0 <= k < n, for an automorphism.
func (s Map) exponent() int { return s.twist() }

// fixesBase says whether the map follows the fixed embedding on the field that
// its own was made over, so that the image of the generator tells everything.
func (s Map) fixesBase() bool { return s.twist()%s.M.From().Base().AbsoluteDegree() == 0 }

// twist is the k with s = (x |-> x^(p^k)) * (fixed embedding).
func (s Map) twist() int {
	w := algebra.NewWork(nil)
	K := s.M.From()
	m, err := field.Embed(w, K, s.M.To())
	if err != nil {
		return 0
	}
	// A map is known by what it does to the generators of the tower.
	var fixed, images []field.Elem
	for _, g := range towerGenerators(w, K) {
		fixed, images = append(fixed, m.Apply(w, g)), append(images, s.M.Apply(w, g))
	}
	for k := range K.AbsoluteDegree() {
		same := true
		for i := range fixed {
			same = same && fixed[i].Equal(images[i])
			fixed[i] = fixed[i].Frobenius(w, 1)
		}
		if same {
			return k
		}
	}
	return 0
}

// towerGenerators are the generators of K, of the field it was made over, and
// so on down to the prime field, as elements of K.
func towerGenerators(w *algebra.Work, K *field.Field) []field.Elem {
	var list []field.Elem
	for F := K; !F.IsPrime(); F = F.Base() {
		if field.Same(F, K) {
			list = append(list, K.Generator())
			continue
		}
		m, err := field.Embed(w, F, K)
		if err != nil {
			break
		}
		list = append(list, m.Apply(w, F.Generator()))
	}
	return list
}

func (s Map) TeX(p *Printer) string {
	K := s.M.From()
	if K.IsPrime() {
		return `1 \mapsto 1`
	}
	return LetterTeX(generatorText(K)) + ` \mapsto ` + elementTeX(p, s.M.Image())
}

func (s Map) Canonical() (string, map[string]any) {
	w := algebra.NewWork(nil)
	var images []field.Elem
	for _, g := range towerGenerators(w, s.M.From()) {
		images = append(images, s.M.Apply(w, g))
	}
	return "map", map[string]any{
		"from": machineField(s.M.From()), "to": machineField(s.M.To()),
		"images of the generators": machineCoefficients(images),
	}
}

// Call applies the map.
func (s Map) Call(c *Context, args []Value) (Value, error) {
	if len(args) != 1 {
		return nil, algebra.Errorf(algebra.Invalid, "a map of fields takes one argument, not %d", len(args))
	}
	switch x := operand(args[0]).(type) {
	case FieldPolynomial:
		f, err := toFieldPolynomial(c, x, s.M.From(), x.Letter)
		if err != nil {
			return nil, err
		}
		return FieldPolynomial{f.P.Map(c.W, s.M), f.Letter}, nil
	case Field:
		return nil, algebra.Errorf(algebra.Invalid, "a map is applied to elements; image of s is the image of the whole field")
	case Collection:
		items, err := Members(c, x)
		if err != nil {
			return nil, err
		}
		images := make([]Value, len(items))
		for i, v := range items {
			if images[i], err = s.Call(c, []Value{v}); err != nil {
				return nil, err
			}
		}
		return List{Items: images}, nil
	default:
		e, err := ToField(c, x, s.M.From())
		if err != nil {
			return nil, err
		}
		return Element{s.M.Apply(c.W, e.E)}, nil
	}
}

// compose is s * t: first t, then s.
func compose(c *Context, a, b Value) (Value, error) {
	s, t := a.(Map).M, b.(Map).M
	if !field.Same(t.To(), s.From()) {
		return nil, algebra.Errorf(algebra.Mismatch, "the maps do not fit together: the first one applied goes to %s, the next one starts from %s", nameOf(c.Printer(), t.To()), nameOf(c.Printer(), s.From()))
	}
	return Map{t.Then(c.W, s)}, nil
}

func iterate(c *Context, a, b Value) (Value, error) {
	s, n := a.(Map), b.(Integer).N
	if !s.isEndomorphism() {
		return nil, algebra.Errorf(algebra.Mismatch, "only a map of a field into itself has powers")
	}
	L := s.M.From()
	order := big.NewInt(int64(L.AbsoluteDegree()))
	k := new(big.Int).Mul(big.NewInt(int64(s.exponent())), n)
	return FrobeniusPower(c, L, int(k.Mod(k, order).Int64()))
}

// FrobeniusPower is x |-> x^(p^k) on L.
func FrobeniusPower(c *Context, L *field.Field, k int) (Value, error) {
	if k %= L.AbsoluteDegree(); k == 0 {
		m, err := embed(c, L, L)
		if err != nil {
			return nil, err
		}
		return Map{m}, nil
	}
	P, err := field.Prime(c.W, L.Characteristic())
	if err != nil {
		return nil, err
	}
	m, err := powerBySquaring(c, field.Frobenius(c.W, L, P), big.NewInt(int64(k)), func(x, y *field.Map) (*field.Map, error) {
		return y.Then(c.W, x), nil
	})
	if err != nil {
		return nil, err
	}
	return Map{m}, nil
}

// Order is the order of an automorphism.
func (s Map) Order() (int, error) {
	if !s.isEndomorphism() {
		return 0, algebra.Errorf(algebra.Undefined, "only an automorphism has an order")
	}
	n := s.M.From().AbsoluteDegree()
	return n / gcd(n, s.exponent()), nil
}

// FixedDegree is the degree over the prime field of the field an automorphism
// fixes.
func (s Map) FixedDegree() int { return gcd(s.M.From().AbsoluteDegree(), s.exponent()) }

// mapByImage is (a |-> b) over K: the homomorphism from K that sends its
// generator, which is called a, to b.
func mapByImage(c *Context, f Function, K *field.Field) (Value, error) {
	if f.Arity != 1 || len(f.Params) != 1 || !named(K) || f.Params[0] != K.Name() {
		e := algebra.Errorf(algebra.Invalid, "this function is not given by the image of the generator of %s", nameOf(c.Printer(), K))
		if named(K) {
			return nil, e.WithRemedy("write (%s |-> ...) over %s", K.Name(), nameOf(c.Printer(), K))
		}
		return nil, e.WithRemedy("name the generator first: let K = %s generated by a", nameOf(c.Printer(), K))
	}
	v, err := f.Call(c, []Value{Element{K.Generator()}})
	if err != nil {
		return nil, err
	}
	L := K
	if e, ok := operand(v).(Element); ok && e.E.Field().AbsoluteDegree()%K.AbsoluteDegree() == 0 {
		L = e.E.Field()
	}
	image, err := ToField(c, v, L)
	if err != nil {
		return nil, err
	}
	m, err := field.NewMap(c.W, K, L, image.E)
	if err != nil {
		return nil, err
	}
	return Map{m}, nil
}

func equalMaps(c *Context, a, b Map) (algebra.Verdict, error) {
	if !field.Same(a.M.From(), b.M.From()) || !field.Same(a.M.To(), b.M.To()) {
		return algebra.Verdict{}, algebra.Errorf(algebra.Mismatch, "maps between different fields are not compared")
	}
	for _, g := range towerGenerators(c.W, a.M.From()) {
		if x, y := a.M.Apply(c.W, g), b.M.Apply(c.W, g); !x.Equal(y) {
			return algebra.Because(false, "they send %s to %s and to %s", Element{g}.Text(nil), Element{x}.Text(nil), Element{y}.Text(nil)), nil
		}
	}
	return algebra.Because(true, "the images of the generators were compared"), nil
}

func equalFields(_ *Context, a, b Field) (algebra.Verdict, error) {
	switch {
	case field.Same(a.K, b.K):
		return algebra.Because(true, "both have the same presentation"), nil
	case a.K.Characteristic().Cmp(b.K.Characteristic()) != 0:
		return algebra.Because(false, "the characteristics %s and %s differ", a.K.Characteristic(), b.K.Characteristic()), nil
	case a.K.AbsoluteDegree() != b.K.AbsoluteDegree():
		return algebra.Because(false, "the degrees %d and %d over the prime field differ", a.K.AbsoluteDegree(), b.K.AbsoluteDegree()), nil
	}
	return algebra.Because(false, "they are isomorphic, and given by different polynomials: isomorphism from K to L carries elements over"), nil
}

// Subfield decides K <= L: whether K lies in L along the fixed embeddings.
func Subfield(_ *Context, K, L Field) (algebra.Verdict, error) {
	if K.K.Characteristic().Cmp(L.K.Characteristic()) != 0 {
		return algebra.Because(false, "the characteristics %s and %s differ", K.K.Characteristic(), L.K.Characteristic()), nil
	}
	n, m := K.K.AbsoluteDegree(), L.K.AbsoluteDegree()
	v := algebra.Because(m%n == 0, "%d divides %d", n, m)
	if m%n != 0 {
		v = algebra.Because(false, "%d does not divide %d", n, m)
	}
	v.Evidence.Source = "R. Lidl and H. Niederreiter, Finite Fields, 1997, theorem 2.6"
	return v, nil
}
