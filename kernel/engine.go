package kernel

import "context"

// Engine is a language with a session. Execute and Evaluate are called one at
// a time; the others at any moment, also while a cell runs, and must then
// answer at once. Places in a text are bytes.
type Engine interface {
	Info() Info
	// Execute runs a cell and returns soon after ctx has ended. A failed cell
	// leaves the session as it was. It does not use out after it has returned.
	Execute(ctx context.Context, code string, out Output) *Failure
	// Evaluate is the value of one expression, without side effects.
	Evaluate(ctx context.Context, code string) (Bundle, *Failure)
	Complete(code string, at int) Completion
	// Inspect tells about the word at a place; detail 1 asks for more than 0.
	Inspect(code string, at, detail int) (Bundle, bool)
	IsComplete(code string) Completeness
}

// Info is what the kernel says about itself and its language.
type Info struct {
	Implementation string
	Version        string // of the implementation
	Language       string
	LanguageLevel  string // version of the language
	MIMEType       string
	FileExtension  string // with its dot
	Banner         string
	Links          []Link // of the help menu
}

// Link is a title and an address.
type Link struct{ Text, URL string }

// Bundle is one thing to show in several forms: MIME type to text, to bytes, or
// to a value that becomes JSON.
type Bundle struct {
	Data     map[string]any
	Metadata map[string]any
}

// Output takes what a cell shows, in the order in which it is shown.
type Output interface {
	Stdout(text string)
	Stderr(text string)
	Display(b Bundle)
	Result(b Bundle) // at most once, and last
	Page(b Bundle)   // for the client's pager
	Clear(wait bool)
}

// Failure is why a cell failed.
type Failure struct {
	Name      string   // short class
	Reason    string   // says everything in one line
	Traceback []string // the lines that a notebook shows; may hold ANSI colours
}

// Completion is what could stand in place of bytes From to To, best first.
type Completion struct {
	From, To int
	Items    []Item
}

// Item is one way to go on.
type Item struct{ Text, Kind, Signature string }

// Status says whether a text is ready to run, in the protocol's words.
type Status string

// What IsComplete may say.
const (
	Complete   Status = "complete"
	Incomplete Status = "incomplete"
	Invalid    Status = "invalid"
)

// Completeness is the answer of IsComplete. Indent is what the next line of an
// incomplete text should begin with.
type Completeness struct {
	Status Status
	Indent string
}
