package eval

import "adjoin/eval/display"

// Sink receives what a cell shows, in the order in which the cell shows it.
// The session calls it from one goroutine at a time and never after Execute
// has returned.
type Sink interface {
	// Say is a line of text of the statement say, line end included.
	Say(text string)
	// Display is the value of an expression statement that is not the last.
	Display(b display.Bundle)
	// Result is the value of the cell: of its last statement, when that is an
	// expression.
	Result(b display.Bundle)
	// Page is what the statement explain shows.
	Page(b display.Bundle)
	// Clear wipes what the cell has shown so far; with wait, only when the next
	// thing is shown.
	Clear(wait bool)
	// Warn is one line, line end included, about something that works and may
	// not be what was meant.
	Warn(text string)
}
