package eval

import (
	"fmt"
	"strings"
	"unicode/utf8"

	"adjoin/algebra"
	"adjoin/lang"
)

// Error is why a cell failed, and where.
type Error struct {
	Line, Column int    // from 1; the column counts characters
	Excerpt      string // the line of the source, without its end
	Caret        int    // characters of the excerpt before the place
	Name         string // a short class: Syntax, UnknownName, ReducibleModulus, Undefined, TooLarge, ...
	Reason       string // what is wrong, in the language of the trade
	Remedy       string // the way out; may be empty
}

// Error is the failure in one line.
func (e *Error) Error() string {
	if e.Remedy == "" {
		return fmt.Sprintf("line %d, column %d: %s", e.Line, e.Column, e.Reason)
	}
	return fmt.Sprintf("line %d, column %d: %s; %s", e.Line, e.Column, e.Reason, e.Remedy)
}

// Text is the failure as a block: the place and the reason, the line with a
// caret under the place, and the way out.
func (e *Error) Text() string {
	var b strings.Builder
	fmt.Fprintf(&b, "line %d, column %d: %s\n", e.Line, e.Column, e.Reason)
	fmt.Fprintf(&b, "    %s\n    %s^\n", e.Excerpt, strings.Repeat(" ", e.Caret))
	if e.Remedy != "" {
		fmt.Fprintf(&b, "    %s\n", e.Remedy)
	}
	return strings.TrimRight(b.String(), "\n")
}

// Names of the classes of Error that do not come from algebra.
const (
	nameSyntax     = "Syntax"
	nameUnknown    = "UnknownWord"
	nameFalseClaim = "FalseClaim"
	nameDefect     = "Defect"
)

var kindNames = map[algebra.Kind]string{
	algebra.Undefined:   "Undefined",
	algebra.Unable:      "Unable",
	algebra.TooLarge:    "TooLarge",
	algebra.Mismatch:    "Mismatch",
	algebra.Invalid:     "Invalid",
	algebra.Interrupted: "Interrupted",
}

// fault is a failure during evaluation, with the span that is to blame.
type fault struct {
	at             lang.Span
	name           string
	reason, remedy string
}

func (f *fault) Error() string { return f.reason }

// longest excerpt shown; a longer line is cut around the place.
const excerptWidth = 100

// locate turns a fault into an Error that shows the line of src it is in.
func locate(src string, f *fault) *Error {
	pos := min(max(f.at.Start, 0), len(src))
	start := strings.LastIndexByte(src[:pos], '\n') + 1
	end := len(src)
	if i := strings.IndexByte(src[pos:], '\n'); i >= 0 {
		end = pos + i
	}
	e := &Error{
		Line:   strings.Count(src[:start], "\n") + 1,
		Column: utf8.RuneCountInString(src[start:pos]) + 1,
		Name:   f.name,
		Reason: shorten(f.reason),
		Remedy: shorten(f.remedy),
	}
	e.Excerpt, e.Caret = excerpt(src[start:end], pos-start)
	return e
}

// excerpt cuts a long line around byte offset at and makes every character
// one column wide.
func excerpt(line string, at int) (text string, caret int) {
	before, after := []rune(printable(line[:at])), []rune(printable(line[at:]))
	if len(before)+len(after) > excerptWidth {
		if len(before) > excerptWidth/2 {
			before = append([]rune("... "), before[len(before)-excerptWidth/2:]...)
		}
		if room := excerptWidth - len(before); len(after) > room {
			after = append(after[:room:room], []rune(" ...")...)
		}
	}
	return strings.TrimRight(string(before)+string(after), " "), len(before)
}

func printable(s string) string {
	return strings.Map(func(r rune) rune {
		if r < ' ' || r == 0x7f || r == utf8.RuneError {
			return ' '
		}
		return r
	}, strings.ToValidUTF8(s, "?"))
}

// longest text of a reason or remedy, in characters.
const reasonWidth = 600

func shorten(s string) string {
	if utf8.RuneCountInString(s) <= reasonWidth {
		return s
	}
	r := []rune(s)
	return string(r[:reasonWidth/2]) + " ... " + string(r[len(r)-reasonWidth/4:])
}
