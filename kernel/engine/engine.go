package engine

import (
	"context"

	"adjoin/eval"
	"adjoin/eval/display"
	"adjoin/kernel"
	"adjoin/lang"
)

// Engine runs cells in a session.
type Engine struct{ session *eval.Session }

// New returns an engine with a fresh session.
func New(o eval.Options) *Engine { return &Engine{eval.NewSession(o)} }

// Info implements kernel.Engine.
func (e *Engine) Info() kernel.Info {
	return kernel.Info{
		Implementation: "adjoin",
		Version:        Version,
		Language:       "adjoin",
		LanguageLevel:  Level,
		MIMEType:       "text/x-adjoin",
		FileExtension:  ".adj",
		Banner:         "Adjoin " + Version + ": field extensions in textbook notation; explain lists the vocabulary",
	}
}

// Execute implements kernel.Engine.
func (e *Engine) Execute(ctx context.Context, code string, out kernel.Output) *kernel.Failure {
	return failure(e.session.Execute(ctx, code, sink{out}))
}

// Evaluate implements kernel.Engine.
func (e *Engine) Evaluate(ctx context.Context, code string) (kernel.Bundle, *kernel.Failure) {
	b, err := e.session.Evaluate(ctx, code)
	return kernel.Bundle(b), failure(err)
}

// Complete implements kernel.Engine.
func (e *Engine) Complete(code string, at int) kernel.Completion {
	c := e.session.Complete(code, at)
	k := kernel.Completion{From: c.From, To: c.To}
	for _, i := range c.Items {
		k.Items = append(k.Items, kernel.Item{Text: i.Text, Kind: i.Kind, Signature: i.Signature})
	}
	return k
}

// Inspect implements kernel.Engine. A session tells all it knows at any level
// of detail.
func (e *Engine) Inspect(code string, at, detail int) (kernel.Bundle, bool) {
	b, found := e.session.Inspect(code, at)
	return kernel.Bundle(b), found
}

// IsComplete implements kernel.Engine.
func (e *Engine) IsComplete(code string) kernel.Completeness {
	c := e.session.IsComplete(code)
	k := kernel.Completeness{Indent: c.Indent}
	switch c.Status {
	case lang.Complete:
		k.Status = kernel.Complete
	case lang.Incomplete:
		k.Status = kernel.Incomplete
	default:
		k.Status = kernel.Invalid
	}
	return k
}

// sink is the way of what a cell shows.
type sink struct{ out kernel.Output }

func (s sink) Say(text string)          { s.out.Stdout(text) }
func (s sink) Warn(text string)         { s.out.Stderr(text) }
func (s sink) Display(b display.Bundle) { s.out.Display(kernel.Bundle(b)) }
func (s sink) Result(b display.Bundle)  { s.out.Result(kernel.Bundle(b)) }
func (s sink) Page(b display.Bundle)    { s.out.Page(kernel.Bundle(b)) }
func (s sink) Clear(wait bool)          { s.out.Clear(wait) }
