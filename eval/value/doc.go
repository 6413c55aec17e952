// Package value says what the things are that names bind: integers, fields,
// elements, polynomials, maps, lists and their kin. All of them are immutable.
// The package knows how they combine and how they print; it knows no words
// (that is eval/vocabulary) and no syntax tree (that is eval).
//
// Where to start reading: value.go is the interface and the abilities a value
// may have; coerce.go has every rule by which a value moves from one structure
// to another, and operators.go the table of operators that use them.
package value
