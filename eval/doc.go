// Package eval runs cells: it turns the syntax tree of package lang into
// values and shows them. A Session holds the names that earlier cells bound;
// Execute runs one cell within its budget and hands what it shows to a Sink.
//
// It knows no Jupyter: a kernel, a command line and a test are all sinks.
//
// Where to start reading: session.go is the life of a cell; evaluator.go walks
// the tree; phrase.go finds the words of the vocabulary and unpacks their
// arguments. What a value is stands in eval/value, what the words mean in
// eval/vocabulary, and how documents become MIME forms in eval/display.
package eval
