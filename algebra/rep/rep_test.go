package rep_test

import (
	"math/big"
	"math/rand/v2"
	"sync"
	"testing"

	"adjoin/algebra"
	"adjoin/algebra/algtest"
	"adjoin/algebra/poly"
	"adjoin/algebra/rep"
)

func number(s string) *big.Int {
	n, ok := new(big.Int).SetString(s, 0)
	if !ok {
		panic(s)
	}
	return n
}

func mersenne(n uint) *big.Int {
	p := new(big.Int).Lsh(big.NewInt(1), n)
	return p.Sub(p, big.NewInt(1))
}

// extend is the extension of degree n by the first irreducible polynomial.
func extend(A poly.Arith, n int) *rep.Extension {
	w := algebra.NewWork(nil)
	return rep.Extend(w, A, poly.FindIrreducible(w, A, n))
}

func generic(A poly.Arith, n int) *rep.Extension {
	w := algebra.NewWork(nil)
	return rep.Generic(w, A, poly.FindIrreducible(w, A, n))
}

var fields = sync.OnceValue(func() map[string]poly.Arith {
	prime := func(s string) poly.Arith { return rep.Prime(number(s)) }
	f4 := extend(prime("2"), 2)
	return map[string]poly.Arith{
		"F_2":           prime("2"),
		"F_3":           prime("3"),
		"F_5":           prime("5"),
		"F_p 31 bits":   rep.Prime(mersenne(31)),
		"F_p 61 bits":   rep.Prime(mersenne(61)),
		"F_p 63 bits":   prime("9223372036854775783"),
		"F_p 64 bits":   prime("18446744073709551557"),
		"F_p 127 bits":  rep.Prime(mersenne(127)),
		"F_p 521 bits":  rep.Prime(mersenne(521)),
		"F_4":           f4,
		"F_256":         extend(prime("2"), 8),
		"F_1024":        extend(prime("2"), 10),
		"F_2^11":        extend(prime("2"), 11),
		"F_2^64":        extend(prime("2"), 64),
		"F_2^127":       extend(prime("2"), 127),
		"F_2^571":       extend(prime("2"), 571),
		"F_3^5":         extend(prime("3"), 5),
		"F_3^5 generic": generic(prime("3"), 5),
		"F_3^9":         extend(prime("3"), 9),
		"F_5^2":         extend(prime("5"), 2),
		"F_p^2 long":    extend(rep.Prime(mersenne(127)), 2),
		"F_p^3 31 bits": extend(rep.Prime(mersenne(31)), 3),
		"(F_4)^3":       extend(f4, 3),
		"((F_4)^3)^2":   extend(extend(f4, 3), 2),
		"generic tower": generic(generic(f4, 3), 2),
		"(F_9)^3":       extend(extend(prime("3"), 2), 3),
		"(F_2^12)^2":    extend(extend(prime("2"), 12), 3),
	}
})

func TestArith(t *testing.T) {
	for name, A := range fields() {
		t.Run(name, func(t *testing.T) { algtest.Arith(t, A, 1) })
	}
}

func TestCrossovers(t *testing.T) {
	for _, c := range []*int{
		&rep.WordSplit, &rep.LongSplit, &rep.BinarySplit, &rep.TableSplit,
		&rep.PackedNewton, &rep.PackedDivisionThreshold, &rep.ZechSplit, &rep.ZechNewton, &rep.WordNewton, &rep.LongNewton, &rep.BinaryNewton, &rep.TableNewton, &rep.TowerNewton,
	} {
		defer func(old int) { *c = old }(*c)
		*c = 2
	}
	rep.WordKronecker = 2
	defer func() { rep.WordKronecker = 32 }()
	list := fields()
	for _, name := range []string{"F_2", "F_3", "F_p 31 bits", "F_p 63 bits", "F_p 127 bits", "F_256", "F_2^127", "F_3^5", "F_3^5 generic", "((F_4)^3)^2", "generic tower"} {
		A := list[name]
		t.Run(name, func(t *testing.T) { algtest.Arith(t, A, 2) })
	}
}

func TestRepresentationsAgree(t *testing.T) {
	w := algebra.NewWork(nil)
	for _, n := range []int{1, 2, 3, 8, 10} {
		k := rep.Prime(big.NewInt(2))
		m := poly.FindIrreducible(w, k, n)
		algtest.Agree(t, rep.Extend(w, k, m), rep.Generic(w, k, m), uint64(n))
	}
	f4 := extend(rep.Prime(big.NewInt(2)), 2)
	for _, c := range []struct {
		k poly.Arith
		n int
	}{
		{rep.Prime(big.NewInt(3)), 1}, {rep.Prime(big.NewInt(3)), 5}, {rep.Prime(big.NewInt(5)), 2}, {rep.Prime(big.NewInt(61)), 2},
		{f4, 2}, {f4, 3}, {extend(f4, 3), 2}, {extend(rep.Prime(big.NewInt(3)), 2), 3},
	} {
		m := poly.FindIrreducible(w, c.k, c.n)
		algtest.Agree(t, rep.Extend(w, c.k, m), rep.Generic(w, c.k, m), uint64(c.n))
	}
}

// The products of FIPS 197, Advanced Encryption Standard, sections 4.2 and
// 4.2.1: in the field of x^8+x^4+x^3+x+1, {57}{83} = {c1} and {57}{13} = {fe}.
func TestByteField(t *testing.T) {
	w := algebra.NewWork(nil)
	k := rep.Prime(big.NewInt(2))
	m := poly.FromInts(k, 1, 1, 0, 1, 1, 0, 0, 0, 1)
	for _, A := range []poly.Arith{rep.Extend(w, k, m), rep.Generic(w, k, m)} {
		for _, c := range [][3]int64{{0x57, 0x83, 0xc1}, {0x57, 0x13, 0xfe}} {
			a, b := make(poly.Elem, A.Width()), make(poly.Elem, A.Width())
			A.FromCode(a, big.NewInt(c[0]))
			A.FromCode(b, big.NewInt(c[1]))
			A.MulElem(w, a, a, b)
			if A.Code(a).Int64() != c[2] {
				t.Errorf("{%x}{%x} is {%x}, want {%x}", c[0], c[1], A.Code(a), c[2])
			}
		}
	}
}

func TestNoAllocation(t *testing.T) {
	if raceDetector {
		t.Skip("the race detector makes pools forget, at random")
	}
	w := algebra.NewWork(nil)
	list := fields()
	for _, name := range []string{"F_2", "F_p 31 bits", "F_p 61 bits", "F_p 127 bits", "F_256", "F_2^127", "F_3^5", "F_3^5 generic", "((F_4)^3)^2", "generic tower"} {
		A := list[name]
		r := rand.New(rand.NewPCG(1, 1))
		f, g, z := poly.Random(A, r, 71), poly.Random(A, r, 70), new(poly.Poly)
		M := A.NewModulus(w, f)
		e := make(poly.Elem, A.Width())
		run := func() {
			A.Dot(w, e, f, g)
			A.MulElem(w, e, e, e)
			A.AddScaled(w, z, g, e)
			A.Scale(w, z, z, e)
			A.Mul(w, z, f, g)
			M.Reduce(w, z, z)
			M.MulMod(w, z, z, g)
			M.SqrMod(w, z, z)
		}
		run()
		if n := testing.AllocsPerRun(10, run); n != 0 {
			t.Errorf("%s: %v allocations a run", name, n)
		}
	}
}
