// Package flinttest checks the algebra against FLINT, the Fast Library for
// Number Theory, through its Python binding: the same random questions to
// both. It has tests only.
package flinttest
