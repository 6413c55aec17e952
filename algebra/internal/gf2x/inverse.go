package gf2x

import "math/bits"

// InverseScratch is the number of scratch words of Inverse for a modulus of n
// words.
func InverseScratch(n int) int { return 4 * (n + 1) }

// Inverse sets z to 1/a modulo m, of degree d >= 1 and d/64+1 words, and says
// whether a, of degree below d, and m have no common factor. z has Words(d)
// words and may be a. It is Euclid's algorithm a shift at a time, with the
// cofactor of a alone.
func Inverse(z, a, m []uint64, d int, scratch []uint64) bool {
	n := len(m) + 1 // shifting may touch the word above
	r, s, u, v := scratch[:n], scratch[n:2*n], scratch[2*n:3*n], scratch[3*n:4*n]
	clear(scratch[:4*n])
	copy(r, m)
	copy(s, a[:Words(d)])
	v[0] = 1
	dr, ds, dv := d, Degree(s), 0
	// u a = r and v a = s modulo m.
	for ds > 0 {
		next := dv + dr - ds // the degree of the quotient is dr - ds
		for dr >= ds {
			AddShl(r, s[:ds/64+1], dr-ds)
			AddShl(u, v[:dv/64+1], dr-ds)
			dr = degreeFrom(r, dr)
		}
		r, s, u, v = s, r, v, u
		dr, ds, dv = ds, dr, next
	}
	copy(z, v[:Words(d)])
	return ds == 0
}

// degreeFrom is the degree of a, which is at most d.
func degreeFrom(a []uint64, d int) int {
	for i := d / 64; i >= 0; i-- {
		if a[i] != 0 {
			return 64*i + bits.Len64(a[i]) - 1
		}
	}
	return -1
}
