package rep

import (
	"math/big"

	"adjoin/algebra"
)

// TableDegree is the largest n for which F_{2^n} multiplies by logarithms: the
// tables of F_{2^10} still fit a first-level cache.
const TableDegree = 10

// table is F_{2^n} for small n: the residues of binary, one word each, with
// products through logarithms to the least generator g.
//
// log[0] points behind all sums of two logarithms, where exp is zero, so that
// products need no test for zero.
type table struct {
	*binary
	log []uint16
	exp []uint16
}

func newTable(b *binary) *table {
	q := 1 << b.n
	t := &table{b, make([]uint16, q), make([]uint16, 4*q+1)}
	t.log[0] = uint16(2 * q)
	for g := 1; g < q; g++ {
		if t.fill(uint64(g), q) {
			break
		}
	}
	return t
}

// fill sets the tables for the generator g, and says whether g is one.
func (t *table) fill(g uint64, q int) bool {
	x := uint64(1)
	for i := range q - 1 {
		if i > 0 && x == 1 {
			return false
		}
		t.log[x] = uint16(i)
		t.exp[i], t.exp[i+q-1] = uint16(x), uint16(x)
		x = t.slowMul(x, g)
	}
	return true
}

// slowMul multiplies bit by bit, before there are tables.
func (t *table) slowMul(x, y uint64) uint64 {
	var z uint64
	m := t.mod.m.W[0]
	for i := t.n - 1; i >= 0; i-- {
		z <<= 1
		if z>>t.n&1 == 1 {
			z ^= m
		}
		if y>>i&1 == 1 {
			z ^= x
		}
	}
	return z
}

func (t *table) split(n int) bool { return n >= TableSplit }
func (t *table) newton() int      { return TableNewton }

// Crossovers for table fields as for word primes.
var (
	TableSplit  = 64
	TableNewton = 64
)

func (t *table) square(w *algebra.Work, z, x []uint64) {
	clear(z)
	for i := range x {
		t.mul(w, z[2*i:2*i+1], x[i:i+1], x[i:i+1])
	}
}

func (t *table) mul(_ *algebra.Work, z, x, y []uint64) {
	z[0] = uint64(t.exp[int(t.log[x[0]])+int(t.log[y[0]])])
}

func (t *table) convolve(_ *algebra.Work, z, x, y []uint64) {
	clear(z)
	for i, a := range x {
		if a == 0 {
			continue
		}
		exp := t.exp[t.log[a]:]
		zi := z[i : i+len(y)]
		for j, b := range y {
			zi[j] ^= uint64(exp[t.log[b]])
		}
	}
}

func (t *table) dot(_ *algebra.Work, z, x, y []uint64) {
	var sum uint16
	for i, a := range x {
		sum ^= t.exp[int(t.log[a])+int(t.log[y[len(y)-1-i]])]
	}
	z[0] = uint64(sum)
}

func (t *table) scale(_ *algebra.Work, z, x, c []uint64) {
	exp := t.exp[t.log[c[0]]:]
	for i, a := range x {
		z[i] = uint64(exp[t.log[a]])
	}
}

func (t *table) addScaled(_ *algebra.Work, z, x, c []uint64) {
	exp := t.exp[t.log[c[0]]:]
	for i, a := range x {
		z[i] ^= uint64(exp[t.log[a]])
	}
}

func (t *table) inv(_ *algebra.Work, z, x []uint64) bool {
	q1 := 1<<t.n - 1
	z[0] = uint64(t.exp[(q1-int(t.log[x[0]]))%q1])
	return true
}

func (t *table) frobenius(_ *algebra.Work, z, x []uint64, k int) {
	if x[0] == 0 {
		z[0] = 0
		return
	}
	q1 := 1<<t.n - 1
	z[0] = uint64(t.exp[int(t.log[x[0]])*(1<<k%q1)%q1])
}

func (t *table) code(x []uint64) *big.Int { return new(big.Int).SetUint64(x[0]) }
