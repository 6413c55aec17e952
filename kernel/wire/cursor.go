package wire

import "unicode/utf8"

// The protocol counts places in a text in Unicode code points; Go counts
// bytes.

// ByteOffset is the byte at which code point n of s begins. Places outside s
// are moved to its nearer end.
func ByteOffset(s string, n int) int {
	if n <= 0 {
		return 0
	}
	for i := range s {
		if n == 0 {
			return i
		}
		n--
	}
	return len(s)
}

// CodePoint is the number of code points of s before byte i. Bytes outside s
// are moved to its nearer end.
func CodePoint(s string, i int) int {
	return utf8.RuneCountInString(s[:min(max(i, 0), len(s))])
}
