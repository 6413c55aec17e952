// Package lang turns the text of a cell into a syntax tree and back. It knows
// the notation and no mathematics: whether F_6 is a field, or what a minimal
// polynomial is, is for the evaluator. What words there are (the nouns of
// phrases, the roles of literals, the predicates) comes from outside, as a
// Lexicon.
//
// Where to start reading: ast.go is the tree; parse.go is Parse.
package lang
