package gf2x

// AddShl adds x^k a to z, which has at least len(a) + (k+63)/64 words.
func AddShl(z, a []uint64, k int) {
	j, s := k/64, uint(k%64)
	if s == 0 {
		xor(z[j:], a)
		return
	}
	z = z[j : j+len(a)+1]
	for i, x := range a {
		z[i] ^= x << s
		z[i+1] ^= x >> (64 - s)
	}
}

// Shl sets the len(z) words of z to x^k a, cutting what does not fit. z may
// begin where a does.
func Shl(z, a []uint64, k int) {
	j, s := k/64, uint(k%64)
	for i := len(z) - 1; i >= 0; i-- {
		var x uint64
		if from := i - j; from >= 0 {
			if from < len(a) {
				x = a[from] << s
			}
			if s > 0 && from >= 1 && from-1 < len(a) {
				x |= a[from-1] >> (64 - s)
			}
		}
		z[i] = x
	}
}

// Shr sets the len(z) words of z to a over x^k, without its terms below x^k.
// z may begin where a does.
func Shr(z, a []uint64, k int) {
	j, s := k/64, uint(k%64)
	for i := range z {
		var x uint64
		if from := i + j; from < len(a) {
			x = a[from] >> s
			if s > 0 && from+1 < len(a) {
				x |= a[from+1] << (64 - s)
			}
		}
		z[i] = x
	}
}
