// Package display turns documents into the MIME forms that a notebook shows: a
// document says what is to be read (a table, a formula, a diagram), a Bundle
// holds it once per form (text/plain, text/latex, text/html, image/svg+xml,
// application/pdf).
//
// It knows no values and no mathematics beyond the ranks of a graded diagram;
// whoever has a value builds the document. Every form is a function of the
// document alone: the same document gives the same bytes on every machine.
//
// Which forms go together follows from who reads them. A formula has no
// text/html, or readers would prefer that to the typeset one. A figure has no
// text/latex, or a printed notebook would show the source in place of the
// picture. A table has both, because each of the two readers needs its own.
//
// Where to start reading: bundle.go says what a document is; table.go,
// formula.go, verdict.go, matrix.go and diagram.go are the documents. A
// diagram goes through layered.go (levels), ordering.go (who stands beside
// whom), placing.go (where exactly) and drawing.go (the picture), which svg.go,
// pdf.go and tikz.go write down. notation.go reads the little notation of
// labels, such as F_{2^12}.
package display
