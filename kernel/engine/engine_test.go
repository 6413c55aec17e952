package engine

import (
	"context"
	"strings"
	"testing"
	"time"

	"adjoin/eval"
	"adjoin/kernel"
)

// tape writes down what a cell shows.
type tape struct{ lines []string }

func (t *tape) put(kind, text string)   { t.lines = append(t.lines, kind+" "+strings.TrimSpace(text)) }
func (t *tape) Stdout(text string)      { t.put("stdout", text) }
func (t *tape) Stderr(text string)      { t.put("stderr", text) }
func (t *tape) Display(b kernel.Bundle) { t.put("display", b.Data["text/plain"].(string)) }
func (t *tape) Result(b kernel.Bundle)  { t.put("result", b.Data["text/plain"].(string)) }
func (t *tape) Page(b kernel.Bundle)    { t.put("page", b.Data["text/plain"].(string)[:4]) }
func (t *tape) Clear(bool)              { t.put("clear", "") }

func TestOutputs(t *testing.T) {
	for code, want := range map[string]string{
		`say "hello"`:  "stdout hello",
		"1\n2\n3":      "display 1|display 2|result 3",
		"let b = 1":    "",
		"explain norm": "page norm",
		"clear output": "clear ",
	} {
		var out tape
		if f := New(eval.Options{}).Execute(context.Background(), code, &out); f != nil {
			t.Errorf("%s: %+v", code, f)
		}
		if got := strings.Join(out.lines, "|"); got != want {
			t.Errorf("%s: %s", code, got)
		}
	}
	var out tape
	New(eval.Options{}).Execute(context.Background(), "let trace = 1", &out)
	if len(out.lines) != 1 || !strings.HasPrefix(out.lines[0], "stderr trace") {
		t.Errorf("%v", out.lines)
	}
}

func TestFailure(t *testing.T) {
	f := New(eval.Options{}).Execute(context.Background(), "let a = 1\n1/0", &tape{})
	if f == nil {
		t.Fatal("1/0 has a value")
	}
	if f.Name == "" || !strings.Contains(f.Reason, "line 2") || strings.ContainsAny(f.Reason, "\x1b\n") {
		t.Errorf("%+v", f)
	}
	all := strings.Join(f.Traceback, "\n")
	if !strings.HasPrefix(all, red) || !strings.Contains(all, "1/0") || !strings.Contains(all, bold+"^"+plain) {
		t.Errorf("%q", all)
	}
}

func TestEvaluateBindsNothing(t *testing.T) {
	e := New(eval.Options{})
	if b, f := e.Evaluate(context.Background(), "6*7"); f != nil || b.Data["text/plain"] != "42" {
		t.Errorf("%v %v", b, f)
	}
	if _, f := e.Evaluate(context.Background(), "let q = 1"); f == nil {
		t.Error("a statement is evaluated")
	}
}

func TestAsides(t *testing.T) {
	e := New(eval.Options{})
	e.Execute(context.Background(), "let Komet = F_8", &tape{})
	code := "𝔽_8 + Kom"
	c := e.Complete(code, len(code))
	if len(c.Items) == 0 || c.Items[0].Text != "Komet" || code[c.From:c.To] != "Kom" {
		t.Errorf("%+v", c)
	}
	if b, ok := e.Inspect("trace", 3, 0); !ok || b.Data["text/plain"] == nil {
		t.Errorf("%v %v", b, ok)
	}
	for code, want := range map[string]kernel.Status{"1 + 1": kernel.Complete, "gcd of (1,": kernel.Incomplete, "1 )": kernel.Invalid} {
		if got := e.IsComplete(code); got.Status != want {
			t.Errorf("%s: %+v", code, got)
		}
	}
}

func TestInterrupt(t *testing.T) {
	e := New(eval.Options{})
	ctx, cancel := context.WithCancel(context.Background())
	done := make(chan *kernel.Failure)
	go func() { done <- e.Execute(ctx, "order of g_{2^1009}", &tape{}) }()
	time.Sleep(20 * time.Millisecond)
	cancel()
	select {
	case f := <-done:
		if f == nil || f.Name != "Interrupted" {
			t.Errorf("%+v", f)
		}
	case <-time.After(5 * time.Second):
		t.Fatal("it goes on")
	}
	var out tape
	if f := e.Execute(context.Background(), "6*7", &out); f != nil || out.lines[0] != "result 42" {
		t.Errorf("afterwards: %+v %v", f, out.lines)
	}
}
