// Package gf2x has the kernels of GF(2)[x] on machine words: bit i of word j
// is the coefficient of x^(64 j + i). The functions are free, take slices of
// stated lengths, and know no types of ours. Everything here is portable Go;
// faster twins may stand beside it under the same names.
package gf2x
