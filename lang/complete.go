package lang

import (
	"strings"
)

// Status says whether a text is ready to run.
type Status int

// The three answers of IsComplete.
const (
	Complete   Status = iota // it parses
	Incomplete               // further lines can mend it: an open bracket, a line that ends in an operator
	Invalid                  // no further line mends it
)

// Completeness is the answer of IsComplete. Indent is what the next line of
// an incomplete text should begin with, and empty otherwise.
type Completeness struct {
	Status Status
	Indent string
}

// IsComplete says whether src can run as it stands or waits for more lines.
func IsComplete(src string, lex *Lexicon) Completeness {
	_, fault := Parse(src, lex)
	switch {
	case fault == nil:
		return Completeness{Status: Complete}
	case fault.Incomplete:
		return Completeness{Incomplete, indent(src)}
	}
	return Completeness{Status: Invalid}
}

// indent is that of the line on which the open statement begins, and four
// blanks more for each of its lines that leaves a bracket open, but at least
// once.
func indent(src string) string {
	begin, line := 0, -1
	var lines []int // of the open brackets
	fresh := true   // the next token begins a statement
	l := newLayout(src)
	for {
		t, err := l.Next()
		if err != nil || t.EOF() {
			break
		}
		if t.Type == tEnd {
			fresh = fresh || l.open == 0
			continue
		}
		if fresh {
			begin, fresh = t.Pos.Offset, false
		}
		if t.Type == tBracket {
			if closing[t.Value] != "" {
				lines = append(lines, t.Pos.Line)
			} else if len(lines) > 0 {
				lines = lines[:len(lines)-1]
			}
		}
	}
	steps := 0
	for _, n := range lines {
		if n != line {
			steps++
			line = n
		}
	}
	first := src[strings.LastIndexByte(src[:begin], '\n')+1:]
	blank := first[:span(first, func(r rune, _ int) bool { return r == ' ' || r == '\t' })]
	return blank + strings.Repeat("    ", max(1, steps))
}
