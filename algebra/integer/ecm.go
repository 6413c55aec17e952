package integer

import (
	"math/big"

	"adjoin/algebra"
	"adjoin/algebra/internal/limbs"
)

// References:
//
//	[Lenstra] H. Lenstra, Factoring integers with elliptic curves, 1987.
//	[Montgomery] P. Montgomery, Speeding the Pollard and elliptic curve methods
//	  of factorization, 1987: the curves b y^2 = x^3 + a x^2 + x with the
//	  ordinate left out, and the second stage.
//	[Suyama] the family of curves with a point of order 3 and group order
//	  divisible by 12, as in the same paper, section 10.3.1.

// level is a number of curves with one bound for the first stage; the second
// stage goes to fifty times that bound.
type level struct{ bound, curves int }

// levels are the customary choices for prime factors of 15, 20 and 25 digits.
var levels = []level{{2000, 25}, {11000, 90}, {50000, 150}}

// effort bounds the work on one number, in products of words: some ten
// seconds. Long numbers get fewer curves.
const effort = 5e9

// ecm is a proper divisor of a composite n, or nil when the effort did not
// find one.
func ecm(w *algebra.Work, n *big.Int) *big.Int {
	r := seeded(n)
	words := float64(n.BitLen()/64 + 2)
	left := effort
	for _, l := range levels {
		primes := PrimesUpTo(50 * l.bound)
		for range l.curves {
			// Some 16 products a bit in the first stage, and as many again in the
			// second.
			if left -= 32 * float64(l.bound) * 2 * words * words; left < 0 {
				return nil
			}
			if d := newCurve(n, 6+r.Int64N(1<<40)).run(w, l.bound, primes); d != nil {
				return d
			}
		}
	}
	return nil
}

// curve is one Montgomery curve modulo n, with its scratch. Numbers are
// residues of limbs.
type curve struct {
	n       *big.Int
	m       *limbs.Mod
	a24     []uint64 // (a+2)/4
	p       point
	t       []uint64
	a, b, c []uint64
	d, e    []uint64
	found   *big.Int // a divisor met on the way
}

type point struct{ x, z []uint64 }

func (c *curve) number() []uint64 { return make([]uint64, c.m.K) }

func (c *curve) point() point { return point{c.number(), c.number()} }

// newCurve is the curve of parameter s [Suyama].
func newCurve(n *big.Int, s int64) *curve {
	c := &curve{n: n, m: limbs.New(n)}
	c.t = make([]uint64, c.m.Scratch())
	c.a, c.b, c.c, c.d, c.e = c.number(), c.number(), c.number(), c.number(), c.number()
	u := new(big.Int).SetInt64(s)
	u.Mul(u, u).Sub(u, big.NewInt(5)).Mod(u, n)
	v := new(big.Int).SetInt64(4 * s)
	cube := func(x *big.Int) *big.Int {
		y := new(big.Int).Mul(x, x)
		return y.Mul(y, x).Mod(y, n)
	}
	u3, v3 := cube(u), cube(v)
	// a + 2 = (v-u)^3 (3u+v) / (4 u^3 v)
	num := cube(new(big.Int).Sub(v, u))
	num.Mul(num, new(big.Int).Add(new(big.Int).Mul(big.NewInt(3), u), v))
	den := new(big.Int).Mul(u3, v)
	den.Mul(den, big.NewInt(16)).Mod(den, n)
	inv := new(big.Int)
	if g := new(big.Int).GCD(inv, nil, den, n); g.Cmp(one) != 0 {
		c.found = g
		return c
	}
	num.Mul(num, inv).Mod(num, n)
	c.a24, c.p = c.number(), c.point()
	c.m.Into(c.a24, num, c.t)
	c.m.Into(c.p.x, u3, c.t)
	c.m.Into(c.p.z, v3, c.t)
	return c
}

func (c *curve) mul(z, x, y []uint64) { c.m.Mul(z, x, y, c.t) }

// double sets z to 2 p.
func (c *curve) double(z, p point) {
	c.m.AddVec(c.a, p.x, p.z)
	c.mul(c.a, c.a, c.a)
	c.m.SubVec(c.b, p.x, p.z)
	c.mul(c.b, c.b, c.b)
	c.m.SubVec(c.c, c.a, c.b)
	c.mul(c.d, c.c, c.a24)
	c.m.AddVec(c.d, c.d, c.b)
	c.mul(z.x, c.a, c.b)
	c.mul(z.z, c.c, c.d)
}

// add sets z to p + q, given their difference; z may be any of the three.
func (c *curve) add(z, p, q, difference point) {
	c.m.SubVec(c.a, p.x, p.z)
	c.m.AddVec(c.b, q.x, q.z)
	c.mul(c.a, c.a, c.b)
	c.m.AddVec(c.c, p.x, p.z)
	c.m.SubVec(c.d, q.x, q.z)
	c.mul(c.c, c.c, c.d)
	c.m.AddVec(c.d, c.a, c.c)
	c.mul(c.d, c.d, c.d)
	c.m.SubVec(c.e, c.a, c.c)
	c.mul(c.e, c.e, c.e)
	c.mul(c.a, c.d, difference.z)
	c.mul(z.z, c.e, difference.x)
	copy(z.x, c.a)
}

// times is k p, k >= 1, by the ladder.
func (c *curve) times(k uint64, p point) point {
	r, s := c.point(), c.point()
	copy(r.x, p.x)
	copy(r.z, p.z)
	if k == 1 {
		return r
	}
	c.double(s, p)
	top := 62
	for k>>top == 0 {
		top--
	}
	for b := top - 1; b >= 0; b-- {
		if k>>b&1 == 1 {
			c.add(r, r, s, p)
			c.double(s, s)
		} else {
			c.add(s, r, s, p)
			c.double(r, r)
		}
	}
	return r
}

// divisor is the common divisor of n and a residue, when it is proper.
func (c *curve) divisor(a []uint64) *big.Int {
	g := new(big.Int).GCD(nil, nil, c.m.From(a, c.t), c.n)
	if g.Cmp(one) == 0 || g.Cmp(c.n) == 0 {
		return nil
	}
	return g
}

// run looks for a proper divisor with the given bound.
func (c *curve) run(w *algebra.Work, bound int, primes []int) *big.Int {
	if c.found != nil {
		if c.found.Cmp(c.n) == 0 {
			return nil
		}
		return c.found
	}
	p := c.p
	i := 0
	for ; i < len(primes) && primes[i] <= bound; i++ {
		w.Poll()
		for q := primes[i]; q <= bound; q *= primes[i] {
			p = c.times(uint64(primes[i]), p)
		}
	}
	if d := c.divisor(p.z); d != nil {
		return d
	}
	return c.second(w, p, primes[i:])
}

// second is the second stage: one more prime q, in the list, may divide the
// order. With q = giant*k +- j, q p = 0 exactly when giant*k p and j p have the
// same abscissa, so the product of the differences is collected.
func (c *curve) second(w *algebra.Work, p point, primes []int) *big.Int {
	const giant = 420
	// The odd multiples by steps of 2 p, and their x z.
	var baby [giant/2 + 1]struct{ x, z, xz []uint64 }
	double := c.point()
	c.double(double, p)
	a, b := c.times(1, p), c.times(3, p)
	for j := 1; j <= giant/2; j += 2 {
		xz := c.number()
		c.mul(xz, a.x, a.z)
		baby[j] = struct{ x, z, xz []uint64 }{a.x, a.z, xz}
		next := c.point()
		c.add(next, b, double, a)
		a, b = b, next
	}
	step := c.times(giant, p)
	k := (primes[0] + giant/2) / giant
	at, before := c.times(uint64(k*giant), p), c.times(uint64(max(1, k-1)*giant), p)
	if k == 1 {
		before = c.point() // the point at infinity: x = 1, z = 0
		copy(before.x, c.m.One())
	}
	product := append([]uint64(nil), c.m.One()...)
	x, y, xz := c.number(), c.number(), c.number()
	c.mul(xz, at.x, at.z)
	next := c.point()
	var used [giant/2 + 1]bool // j stands for both primes giant*k +- j
	for _, q := range primes {
		for kq := (q + giant/2) / giant; k < kq; k++ {
			w.Poll()
			c.add(next, at, step, before)
			before, at, next = at, next, before
			c.mul(xz, at.x, at.z)
			clear(used[:])
		}
		j := q - k*giant
		if j < 0 {
			j = -j
		}
		if used[j] {
			continue
		}
		used[j] = true
		// x z' - x' z = (x - x')(z + z') - x z + x' z'
		c.m.SubVec(x, at.x, baby[j].x)
		c.m.AddVec(y, at.z, baby[j].z)
		c.mul(x, x, y)
		c.m.SubVec(x, x, xz)
		c.m.AddVec(x, x, baby[j].xz)
		c.mul(product, product, x)
	}
	return c.divisor(product)
}
