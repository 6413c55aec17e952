package vocabulary

import (
	"strings"

	"adjoin/eval/value"
)

// Class says where a word stands in a sentence.
type Class int

// The classes of words.
const (
	Noun      Class = iota // NOUN of X over Y: minimal polynomial, gcd
	Predicate              // X is PREDICATE: irreducible, subfield of
	Verb                   // X VERB Y: embeds in
	Form                   // X as FORM: table, powers
	Constant               // a name with a fixed value: true, Q
	Notation               // a piece of syntax that the reference explains: claim, F_q
)

func (c Class) String() string {
	return [...]string{"noun", "predicate", "verb", "form", "name", "notation"}[c]
}

// Entry is one word of the vocabulary with everything that is known about it.
type Entry struct {
	Words    string   // as written, without articles: "minimal polynomial"
	Also     []string // other spellings with the same meaning
	Class    Class
	Topic    string // the heading it stands under in the reference
	Meaning  string // one sentence, without a capital and without a full stop
	Source   string // where the word is used in this sense; "" for common words
	Cases    []Case
	Examples []Example
	Syntax   []string    // how a Notation is written; other classes show their cases
	Value    value.Value // of a Constant
}

// Case is one way to use a word: what it takes and what it does.
type Case struct {
	Args []Arg
	// Over says that the case may close with over K, which asks the question
	// there: numbers, polynomials and lists of them among the arguments are
	// moved to K before Do sees them. A case in which over means something
	// else has an Arg for it.
	Over bool
	// Do computes the value. Its slice has one value for each of Args, already
	// of the Go type that the Kind promises; one that was left out is nil.
	Do func(c *value.Context, a []value.Value) (value.Value, error)
}

// Arg is one argument: the preposition before it, a role between the
// preposition and the argument ("to base g", "from mask m"), and its kind. The
// subject of a predicate and of a form has the empty preposition, and so has
// the object of a predicate whose own words end in a preposition ("subfield
// of", "embeds in").
type Arg struct {
	Prep     string
	Role     string
	Kind     Kind
	Optional bool
}

// Example is a cell and the text of its last value.
type Example struct{ Code, Result string }

// Signatures says how the word is written, one line for each way.
func (e *Entry) Signatures() []string {
	if e.Class == Notation {
		return e.Syntax
	}
	if e.Class == Constant {
		return []string{e.Words}
	}
	var lines []string
	seen := map[string]bool{}
	for _, k := range e.Cases {
		if s := e.signature(k); !seen[s] {
			seen[s] = true
			lines = append(lines, s)
		}
	}
	return lines
}

func (e *Entry) signature(k Case) string {
	var b strings.Builder
	for i, a := range k.Args {
		switch {
		case i == 0 && e.Class != Noun:
			b.WriteString(a.Kind.Letter)
			switch e.Class {
			case Predicate:
				b.WriteString(" is")
			case Form:
				b.WriteString(" as")
			}
			b.WriteString(" " + e.Words)
			continue
		case i == 0:
			b.WriteString(e.Words)
		}
		part := ""
		for _, w := range []string{a.Prep, a.Role, a.Kind.Letter} {
			if w != "" {
				part += " " + w
			}
		}
		if a.Optional {
			part = " [" + part[1:] + "]"
		}
		b.WriteString(part)
	}
	if k.Over {
		b.WriteString(" [over R]")
	}
	return b.String()
}
