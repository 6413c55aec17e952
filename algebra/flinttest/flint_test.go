package flinttest

import (
	"bufio"
	"encoding/json"
	"fmt"
	"math/big"
	"math/rand/v2"
	"os/exec"
	"reflect"
	"sort"
	"strings"
	"sync"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/algtest/outside"
	"adjoin/algebra/field"
	"adjoin/algebra/integer"
	"adjoin/algebra/poly"
	"adjoin/algebra/ratpoly"
	"adjoin/algebra/rep"
)

// flint is a running server.py.
type flint struct {
	mu  sync.Mutex
	in  *json.Encoder
	out *bufio.Scanner
}

var start = sync.OnceValue(func() *flint { return new(flint) })

func connect(t *testing.T) *flint {
	t.Helper()
	python := outside.Python(t, "requirements.txt")
	f := start()
	if f.in != nil {
		return f
	}
	c := exec.Command(python, "server.py")
	in, err := c.StdinPipe()
	if err != nil {
		t.Fatal(err)
	}
	out, err := c.StdoutPipe()
	if err != nil {
		t.Fatal(err)
	}
	if err := c.Start(); err != nil {
		t.Fatal(err)
	}
	f.in, f.out = json.NewEncoder(in), bufio.NewScanner(out)
	f.out.Buffer(nil, 1<<26)
	return f
}

type question map[string]any

// ask asks one question and decodes the answer.
func (f *flint) ask(t *testing.T, q question, answer any) {
	t.Helper()
	f.mu.Lock()
	defer f.mu.Unlock()
	if err := f.in.Encode(q); err != nil {
		t.Fatal(err)
	}
	if !f.out.Scan() {
		t.Fatalf("no answer to %v", q)
	}
	if err := json.Unmarshal(f.out.Bytes(), answer); err != nil {
		t.Fatal(err)
	}
}

// space is one field known to both sides.
type space struct {
	name    string
	A       poly.Arith
	p       string
	modulus []string // nil for a prime field
}

func (s space) question(op string) question {
	return question{"op": op, "p": s.p, "modulus": s.modulus}
}

func (s space) codes(f *poly.Poly) []string {
	list := make([]string, f.N)
	for i := range list {
		list[i] = s.A.Code(poly.Coeff(s.A, f, i)).String()
	}
	return list
}

func spaces() []space {
	w := algebra.NewWork(nil)
	var list []space
	for _, p := range []string{"2", "3", "5", "101", "2147483647", "2305843009213693951", "18446744073709551557", "340282366920938463463374607431768211297"} {
		n, _ := new(big.Int).SetString(p, 10)
		list = append(list, space{"F_" + p, rep.Prime(n), p, nil})
	}
	for _, c := range []struct {
		p int64
		n int
	}{{2, 2}, {2, 8}, {2, 11}, {2, 64}, {2, 127}, {3, 2}, {3, 5}, {3, 40}, {7, 3}, {101, 4}, {1<<31 - 1, 3}, {1<<61 - 1, 2}} {
		k := rep.Prime(big.NewInt(c.p))
		m := poly.FindIrreducible(w, k, c.n)
		s := space{p: fmt.Sprint(c.p), A: k}
		s.modulus = s.codes(m)
		s.name, s.A = fmt.Sprintf("F_%d^%d", c.p, c.n), rep.Extend(w, k, m)
		list = append(list, s)
	}
	return list
}

const seed = 20240607

func TestPolynomials(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	for _, s := range spaces() {
		t.Run(s.name, func(t *testing.T) {
			A, r := s.A, rand.New(rand.NewPCG(seed, uint64(len(s.name))))
			random := func(n int) *poly.Poly {
				f := poly.Random(A, r, n)
				if f.IsZero() {
					f = poly.X(A)
				}
				return f
			}
			check := func(op string, q question, want ...*poly.Poly) {
				t.Helper()
				var lists [][]string
				if len(want) == 1 {
					lists = make([][]string, 1)
					server.ask(t, q, &lists[0])
				} else {
					server.ask(t, q, &lists)
				}
				for i, f := range want {
					if got := s.codes(f); strings.Join(got, " ") != strings.Join(lists[i], " ") {
						t.Fatalf("seed %d: %s is %v, FLINT has %v", seed, op, got, lists[i])
					}
				}
			}
			for range 12 {
				f, g, h := random(40), random(1+r.IntN(25)), random(1+r.IntN(9))
				q := s.question("product")
				q["f"], q["g"] = s.codes(f), s.codes(g)
				z, y := new(poly.Poly), new(poly.Poly)
				A.Mul(w, z, f, g)
				check("product", q, z)
				A.DivRem(w, z, y, f, g)
				q["op"] = "divide"
				check("quotient and remainder", q, z, y)
				fh, gh := new(poly.Poly), new(poly.Poly)
				A.Mul(w, fh, f, h)
				A.Mul(w, gh, g, h)
				q["op"], q["f"], q["g"] = "gcd", s.codes(fh), s.codes(gh)
				check("gcd", q, poly.GCD(w, A, fh, gh))
				d, u, v := poly.XGCD(w, A, f, g)
				q["op"], q["f"], q["g"] = "xgcd", s.codes(f), s.codes(g)
				if g.N > 1 && f.N > 1 {
					check("extended gcd", q, d, u, v)
				}
				q["op"], q["f"], q["g"] = "compose", s.codes(h), s.codes(g)
				check("composition", q, poly.Compose(w, A, h, g))
				A.Derivative(z, f)
				q["op"], q["f"] = "derivative", s.codes(f)
				check("derivative", q, z)
				if fh.N > 1 {
					q["op"], q["f"], q["g"], q["m"] = "compose modulo", s.codes(g), s.codes(h), s.codes(fh)
					check("composition modulo m", q, poly.ComposeMod(w, A, g, h, fh))
				}
				if g.N > 1 {
					e := new(big.Int).SetUint64(r.Uint64())
					q["op"], q["f"], q["g"], q["e"] = "power", s.codes(f), s.codes(g), e.String()
					check("power modulo g", q, poly.PowMod(w, A, f, e, g))
				}
			}
		})
	}
}

func TestFactorizations(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	for _, s := range spaces() {
		t.Run(s.name, func(t *testing.T) {
			A, r := s.A, rand.New(rand.NewPCG(seed, uint64(len(s.name))))
			for range 8 {
				f := poly.Random(A, r, 24)
				for range 3 {
					g := poly.Random(A, r, 4)
					A.Mul(w, g, g, g)
					if !g.IsZero() {
						A.Mul(w, f, f, g)
					}
				}
				if f.IsZero() {
					continue
				}
				q := s.question("factor")
				q["f"] = s.codes(f)
				var answer struct {
					Lead    string
					Factors [][2]any
				}
				server.ask(t, q, &answer)
				var want, got []string
				for _, x := range answer.Factors {
					want = append(want, fmt.Sprint(x[0], "^", x[1]))
				}
				lead, list := poly.Factorize(w, A, f)
				for _, x := range list {
					got = append(got, fmt.Sprint(s.codes(x.F), "^", x.E))
				}
				sort.Strings(want)
				sort.Strings(got)
				if !reflect.DeepEqual(got, want) || A.Code(lead).String() != answer.Lead {
					t.Fatalf("seed %d: factors of %v are %v, FLINT has %v", seed, s.codes(f), got, want)
				}
			}
		})
	}
}

func TestRootsAndIrreducibility(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	for _, s := range spaces() {
		t.Run(s.name, func(t *testing.T) {
			A, r := s.A, rand.New(rand.NewPCG(seed, uint64(len(s.name))))
			for range 8 {
				f := poly.Random(A, r, 3+r.IntN(5))
				if f.N < 2 {
					continue
				}
				q := s.question("irreducible")
				q["f"] = s.codes(f)
				var irreducible bool
				server.ask(t, q, &irreducible)
				if got := poly.IsIrreducible(w, A, f); got.Holds != irreducible {
					t.Fatalf("seed %d: %v is irreducible: %v, FLINT has %v", seed, s.codes(f), got, irreducible)
				}
				// Three roots, one of them twice or thrice.
				a := poly.RandomElem(A, r)
				for _, b := range []poly.Elem{a, a, poly.RandomElem(A, r), poly.RandomElem(A, r)} {
					x := poly.X(A)
					A.Sub(x, x, poly.Constant(A, b))
					A.Mul(w, f, f, x)
				}
				q["op"], q["f"] = "roots", s.codes(f)
				var answer [][2]any
				server.ask(t, q, &answer)
				var want, got []string
				for _, x := range answer {
					want = append(want, fmt.Sprint(x[0], "^", x[1]))
				}
				for _, x := range poly.Roots(w, A, f) {
					got = append(got, fmt.Sprint(A.Code(x.A), "^", x.E))
				}
				sort.Strings(want)
				sort.Strings(got)
				if !reflect.DeepEqual(got, want) {
					t.Fatalf("seed %d: roots of %v are %v, FLINT has %v", seed, s.codes(f), got, want)
				}
			}
		})
	}
}

func TestElements(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	for _, s := range spaces() {
		if s.modulus == nil {
			continue
		}
		t.Run(s.name, func(t *testing.T) {
			p, _ := new(big.Int).SetString(s.p, 10)
			k, err := field.Prime(w, p)
			if err != nil {
				t.Fatal(err)
			}
			c := make([]field.Elem, len(s.modulus))
			for i, x := range s.modulus {
				n, _ := new(big.Int).SetString(x, 10)
				c[i] = k.Int(n)
			}
			K, err := field.Adjoin(w, k, field.NewPolynomial(k, c), "a")
			if err != nil {
				t.Fatal(err)
			}
			r := rand.New(rand.NewPCG(seed, uint64(len(s.name))))
			for range 20 {
				draw := func() field.Elem { return K.Element(K.Arith().Code(poly.RandomElem(K.Arith(), r))) }
				a, b := draw(), draw()
				e, k1 := new(big.Int).SetUint64(r.Uint64()), r.IntN(2*K.Degree())
				q := s.question("element")
				q["a"], q["b"], q["e"], q["k"] = a.Code().String(), b.Code().String(), e.String(), k1
				var answer struct {
					Product, Trace, Norm, Power, Frobenius string
					Inverse                                *string
					Square                                 bool
				}
				server.ask(t, q, &answer)
				trace, err := a.Trace(w, k)
				if err != nil {
					t.Fatal(err)
				}
				norm, err := a.Norm(w, k)
				if err != nil {
					t.Fatal(err)
				}
				power, err := a.Pow(w, e)
				if err != nil {
					t.Fatal(err)
				}
				got := []string{a.Mul(w, b).Code().String(), trace.Code().String(), norm.Code().String(),
					power.Code().String(), a.Frobenius(w, k1).Code().String()}
				if want := []string{answer.Product, answer.Trace, answer.Norm, answer.Power, answer.Frobenius}; !reflect.DeepEqual(got, want) {
					t.Fatalf("seed %d: product, trace, norm, power, conjugate are %v, FLINT has %v", seed, got, want)
				}
				if v := a.IsSquare(w); v.Holds != answer.Square {
					t.Fatalf("seed %d: %v is a square: %v, FLINT has %v", seed, a.Code(), v.Holds, answer.Square)
				}
				if n, _, err := a.Order(w); err == nil {
					var right bool
					q["op"], q["n"] = "is order", n.String()
					server.ask(t, q, &right)
					if !right {
						t.Fatalf("seed %d: FLINT denies that %v has order %v", seed, a.Code(), n)
					}
				} else if !a.IsZero() {
					t.Fatalf("seed %d: the order of %v: %v", seed, a.Code(), err)
				}
				if inverse, err := K.One().Div(w, a); err == nil && inverse.Code().String() != *answer.Inverse {
					t.Fatalf("seed %d: the inverse is %v, FLINT has %v", seed, inverse.Code(), *answer.Inverse)
				}
			}
		})
	}
}

// FLINT knows the Conway polynomials published by F. Lübeck and builds its
// fields from them.
func TestConwayPolynomials(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	for _, c := range []struct {
		p int64
		n int
	}{{2, 20}, {3, 12}, {5, 8}, {7, 6}, {11, 5}, {13, 4}, {31, 4}, {97, 3}, {251, 2}, {997, 2}} {
		for n := 2; n <= c.n; n++ {
			K, err := field.Standard(w, big.NewInt(c.p), n)
			if err != nil {
				t.Fatal(err)
			}
			var want, got []string
			server.ask(t, question{"op": "conway", "p": fmt.Sprint(c.p), "n": n}, &want)
			for _, a := range K.Modulus().Coefficients() {
				got = append(got, a.Code().String())
			}
			if !reflect.DeepEqual(got, want) {
				t.Errorf("F_%d^%d has the modulus %v, FLINT has %v", c.p, n, got, want)
			}
		}
	}
}

func TestIntegers(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(seed, 1))
	for range 60 {
		n := new(big.Int).SetUint64(r.Uint64() >> r.IntN(60))
		n.Add(n, big.NewInt(2))
		n.Mul(n, new(big.Int).SetUint64(1+r.Uint64N(1<<30)))
		var want [][2]any
		server.ask(t, question{"op": "factor integer", "n": n.String()}, &want)
		var got [][2]any
		for _, p := range integer.Factor(w, n).Primes {
			got = append(got, [2]any{p.P.String(), float64(p.E)})
		}
		byText := func(list [][2]any) {
			sort.Slice(list, func(i, j int) bool { return list[i][0].(string) < list[j][0].(string) })
		}
		byText(got)
		byText(want)
		if !reflect.DeepEqual(got, want) {
			t.Fatalf("seed %d: factors of %v are %v, FLINT has %v", seed, n, got, want)
		}
	}
}

// Primes and composites around powers of two, where the methods change.
func TestPrimality(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(seed, 3))
	for _, bits := range []uint{2, 8, 16, 31, 32, 33, 62, 63, 64, 65, 80, 127, 128, 200, 521} {
		for range 30 {
			n := new(big.Int).Lsh(big.NewInt(1), bits)
			n.Add(n, big.NewInt(r.Int64N(2001)-1000))
			if n.Sign() <= 0 {
				continue
			}
			var want bool
			server.ask(t, question{"op": "prime", "n": n.String()}, &want)
			if got := integer.IsPrime(w, n); got.Holds != want {
				t.Fatalf("seed %d: %v is prime: %v, FLINT has %v", seed, n, got, want)
			}
		}
	}
}

func TestCyclotomicPolynomials(t *testing.T) {
	server := connect(t)
	for n := 1; n <= 420; n++ {
		var want, got []string
		server.ask(t, question{"op": "cyclotomic", "n": n}, &want)
		for _, c := range integer.Cyclotomic(n) {
			got = append(got, c.String())
		}
		if !reflect.DeepEqual(got, want) {
			t.Fatalf("cyclotomic polynomial %d is %v, FLINT has %v", n, got, want)
		}
	}
}

func TestIntegerPolynomials(t *testing.T) {
	server := connect(t)
	w := algebra.NewWork(nil)
	r := rand.New(rand.NewPCG(seed, 2))
	random := func(n int, size int64) ratpoly.Poly {
		c := make([]int64, 1+r.IntN(n))
		for i := range c {
			c[i] = r.Int64N(2*size+1) - size
		}
		if f := ratpoly.FromInts(c...); !f.IsZero() {
			return f
		}
		return ratpoly.X()
	}
	text := func(f ratpoly.Poly) []string {
		list := []string{}
		for _, q := range f.Coefficients() {
			list = append(list, q.RatString())
		}
		return list
	}
	for range 40 {
		f, g, h := random(20, 1000), random(12, 1000), random(6, 100)
		q := question{"op": "integer product", "f": text(f), "g": text(g)}
		var list []string
		server.ask(t, q, &list)
		if got := text(f.Mul(w, g)); !reflect.DeepEqual(got, list) {
			t.Fatalf("seed %d: product %v, FLINT has %v", seed, got, list)
		}
		q["op"] = "integer resultant"
		var number string
		server.ask(t, q, &number)
		if got := f.Resultant(w, g).RatString(); got != number {
			t.Fatalf("seed %d: resultant %v, FLINT has %v", seed, got, number)
		}
		if f.Degree() > 0 {
			q["op"] = "integer discriminant"
			server.ask(t, q, &number)
			if got := f.Discriminant(w).RatString(); got != number {
				t.Fatalf("seed %d: discriminant of %v is %v, FLINT has %v", seed, text(f), got, number)
			}
		}
		fh, gh := f.Mul(w, h), g.Mul(w, h)
		q = question{"op": "integer gcd", "f": text(fh), "g": text(gh)}
		server.ask(t, q, &list)
		if got, want := fh.GCD(w, gh).Primitive(), list; !reflect.DeepEqual(text(got), text(parse(want).Primitive())) {
			t.Fatalf("seed %d: gcd %v, FLINT has %v", seed, text(got), want)
		}
		k := fh.Mul(w, h).Mul(w, g)
		var answer struct {
			Unit    string
			Factors [][2]any
		}
		server.ask(t, question{"op": "integer factor", "f": text(k)}, &answer)
		var want, got []string
		for _, x := range answer.Factors {
			want = append(want, fmt.Sprint(x[0], "^", x[1]))
		}
		unit, factors := k.Factor(w)
		for _, x := range factors {
			got = append(got, fmt.Sprint(text(x.F), "^", x.E))
		}
		sort.Strings(want)
		sort.Strings(got)
		if !reflect.DeepEqual(got, want) || unit.RatString() != answer.Unit {
			t.Fatalf("seed %d: factors of %v are %v %v, FLINT has %v %v", seed, text(k), unit, got, answer.Unit, want)
		}
	}
}

func parse(list []string) ratpoly.Poly {
	c := make([]*big.Rat, len(list))
	for i, s := range list {
		c[i], _ = new(big.Rat).SetString(s)
	}
	return ratpoly.New(c)
}
