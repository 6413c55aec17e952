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
