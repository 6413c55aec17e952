package lang

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
func IsComplete(src string, lex *Lexicon) Completeness { panic("to come") }
