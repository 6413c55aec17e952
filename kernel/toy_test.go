package kernel

import (
	"context"
	"errors"
	"fmt"
	"strconv"
	"strings"
	"time"
)

// toy is a language for the tests: one command a line.
//
//	say TEXT, warn TEXT, show TEXT, result TEXT, page TEXT, clear
//	flood N SIZE      N lines of SIZE bytes
//	sleep DURATION    until the time is over or the cell interrupted
//	deaf DURATION     likewise, without listening to interrupts
//	spin              computes until interrupted
//	let NAME VALUE; get NAME
//	fail, panic
type toy struct{ names map[string]string }

func newToy() *toy { return &toy{names: map[string]string{}} }

func (t *toy) Info() Info {
	return Info{Implementation: "toy", Version: "1.2.3", Language: "toy", LanguageLevel: "1", MIMEType: "text/x-toy", FileExtension: ".toy", Banner: "a toy"}
}

func plain(text string) Bundle { return Bundle{Data: map[string]any{"text/plain": text}} }

func failure(name string) *Failure {
	return &Failure{Name: name, Reason: "the reason", Traceback: []string{"line 1: the reason"}}
}

func (t *toy) Execute(ctx context.Context, code string, out Output) *Failure {
	for line := range strings.SplitSeq(code, "\n") {
		word, rest, _ := strings.Cut(line, " ")
		if f := t.command(ctx, word, rest, out); f != nil {
			return f
		}
	}
	return nil
}

func (t *toy) command(ctx context.Context, word, rest string, out Output) *Failure {
	switch word {
	case "":
	case "say":
		out.Stdout(rest + "\n")
	case "warn":
		out.Stderr(rest + "\n")
	case "show":
		out.Display(plain(rest))
	case "result":
		out.Result(plain(rest))
	case "page":
		out.Page(plain(rest))
	case "clear":
		out.Clear(true)
	case "bad":
		out.Result(Bundle{Data: map[string]any{"text/plain": func() {}}})
	case "flood":
		var n, size int
		if _, err := fmt.Sscan(rest, &n, &size); err != nil {
			return failure("Usage")
		}
		for i := range n {
			if ctx.Err() != nil {
				return failure("Interrupted")
			}
			out.Stdout(fmt.Sprintf("%08d%s\n", i, strings.Repeat("x", size-9)))
		}
	case "sleep", "deaf":
		d, err := time.ParseDuration(rest)
		if err != nil {
			return failure("Usage")
		}
		done := ctx.Done()
		if word == "deaf" {
			done = nil
		}
		select {
		case <-time.After(d):
		case <-done:
			return failure("Interrupted")
		}
	case "spin":
		for ctx.Err() == nil {
		}
		return failure("Interrupted")
	case "let":
		name, value, _ := strings.Cut(rest, " ")
		t.names[name] = value
	case "get":
		out.Result(plain(t.names[rest]))
	case "panic":
		panic(errors.New("the toy is broken"))
	default:
		return failure("Unknown")
	}
	return nil
}

func (t *toy) Evaluate(ctx context.Context, code string) (Bundle, *Failure) {
	n, err := strconv.Atoi(code)
	if err != nil {
		return Bundle{}, failure("NotANumber")
	}
	return plain(strconv.Itoa(n)), nil
}

// Complete offers the word before the cursor, doubled.
func (t *toy) Complete(code string, at int) Completion {
	if strings.HasSuffix(code[:at], "panic") {
		panic("completion is broken")
	}
	from := strings.LastIndexByte(code[:at], ' ') + 1
	return Completion{From: from, To: at, Items: []Item{{Text: code[from:at] + code[from:at], Kind: "name", Signature: "()"}}}
}

func (t *toy) Inspect(code string, at, detail int) (Bundle, bool) {
	if at == 0 {
		return Bundle{}, false
	}
	return plain(code[:at]), true
}

func (t *toy) IsComplete(code string) Completeness {
	switch {
	case strings.HasSuffix(code, "("):
		return Completeness{Incomplete, "  "}
	case strings.HasSuffix(code, ")"):
		return Completeness{Status: Invalid}
	}
	return Completeness{Status: Complete}
}
