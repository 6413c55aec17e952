package integer

import (
	"math/big"
	"sort"

	"adjoin/algebra"
)

// IntPower is P^E.
type IntPower struct{ P, E int }

// FactorInt factors n >= 1 by trial division.
func FactorInt(n int) []IntPower {
	var list []IntPower
	for p := 2; p*p <= n; p++ {
		if n%p == 0 {
			f := IntPower{p, 0}
			for ; n%p == 0; n /= p {
				f.E++
			}
			list = append(list, f)
		}
	}
	if n > 1 {
		list = append(list, IntPower{n, 1})
	}
	return list
}

// DivisorsInt is the list of the divisors of n >= 1, in increasing order.
func DivisorsInt(n int) []int {
	list := []int{1}
	for _, f := range FactorInt(n) {
		k := len(list)
		q := 1
		for range f.E {
			q *= f.P
			for _, d := range list[:k] {
				list = append(list, d*q)
			}
		}
	}
	sort.Ints(list)
	return list
}

// Mobius is the Möbius function of n >= 1.
func Mobius(n int) int {
	m := 1
	for _, f := range FactorInt(n) {
		if f.E > 1 {
			return 0
		}
		m = -m
	}
	return m
}

// EulerPhiInt is the number of units modulo n >= 1.
func EulerPhiInt(n int) int {
	phi := n
	for _, f := range FactorInt(n) {
		phi = phi / f.P * (f.P - 1)
	}
	return phi
}

// InverseMod is 1/a modulo m >= 1.
func InverseMod(a, m *big.Int) (*big.Int, error) {
	x := new(big.Int)
	if g := new(big.Int).GCD(x, nil, new(big.Int).Mod(a, m), m); g.Cmp(one) != 0 {
		return nil, algebra.Errorf(algebra.Undefined, "%v has no inverse modulo %v: both are divisible by %v", a, m, g)
	}
	return x.Mod(x, m), nil
}

// CRT is the x with 0 <= x < m and x = residues[i] modulo moduli[i] for all i,
// and m, the least common multiple of the moduli, which are positive. It is an
// error of kind Undefined when two of the congruences contradict each other.
func CRT(residues, moduli []*big.Int) (x, m *big.Int, err error) {
	x, m = new(big.Int), big.NewInt(1)
	u, t := new(big.Int), new(big.Int)
	for i, n := range moduli {
		// x + m k = residue modulo n.
		g := new(big.Int).GCD(u, nil, t.Mod(m, n), n)
		d := new(big.Int).Sub(residues[i], x)
		if d.QuoRem(d, g, t); t.Sign() != 0 {
			return nil, nil, algebra.Errorf(algebra.Undefined,
				"no integer is %v modulo %v and %v modulo %v: they differ modulo %v", x, m, residues[i], n, g)
		}
		step := new(big.Int).Div(n, g)
		d.Mul(d, u).Mod(d, step)
		x.Add(x, d.Mul(d, m))
		m.Mul(m, step)
	}
	return x, m, nil
}

// PerfectPower writes n >= 2 as root^k with the largest k.
func PerfectPower(n *big.Int) (root *big.Int, k int) {
	root, k = perfectPower(n)
	return new(big.Int).Set(root), k
}

// OrderMod is the multiplicative order of a modulo m >= 1.
func OrderMod(w *algebra.Work, a, m *big.Int) (*big.Int, error) {
	if g := new(big.Int).GCD(nil, nil, new(big.Int).Mod(a, m), m); g.Cmp(one) != 0 && m.Cmp(one) != 0 {
		return nil, algebra.Errorf(algebra.Undefined, "%v has no order modulo %v: both are divisible by %v", a, m, g)
	}
	f := Factor(w, m)
	if !f.Complete() {
		return nil, algebra.Errorf(algebra.Unable, "the order of %v needs the prime factors of %v, which were not all found", a, m)
	}
	n := EulerPhi(f)
	fn := Factor(w, n)
	if !fn.Complete() {
		return nil, algebra.Errorf(algebra.Unable, "the order of %v needs the prime factors of %v, which were not all found", a, n)
	}
	order := new(big.Int).Set(n)
	q := new(big.Int)
	for _, p := range fn.Primes {
		for range p.E {
			q.Div(order, p.P)
			if new(big.Int).Exp(a, q, m).Cmp(new(big.Int).Mod(one, m)) != 0 {
				break
			}
			order.Set(q)
		}
	}
	return order, nil
}
