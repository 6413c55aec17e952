// Package lang turns the text of a cell into a syntax tree and back. It knows
// the notation and no mathematics: whether F_6 is a field, or what a minimal
// polynomial is, is for the evaluator. What words there are (the nouns of
// phrases, the roles of literals, the predicates) comes from outside, as a
// Lexicon.
//
// A text goes through scan.go (tokens), layout.go (where statements end),
// grammar.go (statements, by the grammar library) and expression.go
// (operators, by a table of binding powers) with its neighbours relation.go,
// phrase.go and primary.go. The errors a user sees are in fault.go.
//
// Where to start reading: ast.go is the tree; parse.go is Parse; testdata
// holds the notation by example.
package lang
