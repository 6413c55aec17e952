package eval

import (
	"context"
	"fmt"
	"math/rand/v2"
	"runtime/debug"
	"sync"
	"sync/atomic"
	"time"

	"adjoin/algebra"
	"adjoin/eval/display"
	"adjoin/eval/value"
	"adjoin/eval/vocabulary"
	"adjoin/lang"
)

// Budget bounds what one cell may take. Zero fields take their default.
type Budget struct {
	Time   time.Duration // of one cell; default 10 minutes
	Memory int64         // growth of the heap during one cell, in bytes; default 2 GiB
	Output int           // longest text of one value, in bytes, before it is cut; default 256 KiB
}

// Options are what a session starts with.
type Options struct {
	Budget Budget
	Seed   uint64 // of the stream that random choices are drawn from
}

// Session is a conversation: the names that its cells have bound so far.
// Execute and Evaluate are called one at a time; the other methods may be
// called at any moment, also while a cell runs.
type Session struct {
	budget  Budget
	random  *rand.PCG
	running sync.Mutex
	bound   atomic.Pointer[snapshot]
}

// NewSession returns a session without names.
func NewSession(o Options) *Session {
	b := o.Budget
	if b.Time == 0 {
		b.Time = 10 * time.Minute
	}
	if b.Memory == 0 {
		b.Memory = 2 << 30
	}
	if b.Output == 0 {
		b.Output = 256 << 10
	}
	s := &Session{budget: b, random: rand.NewPCG(o.Seed, 0x61646a6f696e)}
	s.bound.Store(newSnapshot(nil))
	return s
}

// Execute runs one cell. Its expression statements are shown in order, the
// last one as the result. When it fails, the error says why and where, and the
// session is as it was before: a failed cell binds nothing.
//
// When ctx ends, or the budget is used up, Execute returns within 100
// milliseconds, even if some computation takes longer to notice; that
// computation's outcome is dropped.
func (s *Session) Execute(ctx context.Context, src string, out Sink) *Error {
	s.running.Lock()
	defer s.running.Unlock()
	return s.run(ctx, src, func(c *cell) error {
		stmts, fault := lang.Parse(src, vocabulary.Lexicon())
		if fault != nil {
			return syntax(fault)
		}
		return c.execute(stmts)
	}, out, true)
}

// Evaluate is the value of one expression, without binding anything.
func (s *Session) Evaluate(ctx context.Context, src string) (display.Bundle, *Error) {
	s.running.Lock()
	defer s.running.Unlock()
	var b display.Bundle
	err := s.run(ctx, src, func(c *cell) error {
		x, fault := lang.ParseExpr(src, vocabulary.Lexicon())
		if fault != nil {
			return syntax(fault)
		}
		v, err := c.eval(x)
		if err != nil {
			return err
		}
		shown := c.bundle(v)
		c.out.emit(func(Sink) { b = shown })
		return nil
	}, nil, false)
	return b, err
}

// grace is how long a stopped computation may take to notice before it is
// left behind.
const grace = 30 * time.Millisecond

// run lets work run on a goroutine of its own, under the budget.
func (s *Session) run(ctx context.Context, src string, work func(*cell) error, out Sink, keep bool) *Error {
	stop := new(algebra.Stop)
	gate := &gate{out: out}
	random := *s.random
	c := &cell{
		src:   src,
		out:   gate,
		scope: &scope{base: s.bound.Load()},
		limit: s.budget.Output,
		ctx: &value.Context{
			W:      algebra.NewWork(stop),
			Limits: value.DefaultLimits,
			Random: rand.New(&random),
		},
	}
	c.ctx.Print = c.printer
	c.ctx.Warn = func(text string) {
		gate.emit(func(o Sink) {
			if o != nil {
				o.Warn(text + "\n")
			}
		})
	}

	done := make(chan error, 1)
	go func() { done <- guarded(c, work) }()
	err := s.watch(ctx, stop, done)
	gate.close()
	if err != nil {
		return locate(src, asFault(err, c.place()))
	}
	if keep {
		*s.random = random
		s.bound.Store(newSnapshot(c.scope.flatten()))
	}
	return nil
}

// watch waits for the work to end, or stops it.
func (s *Session) watch(ctx context.Context, stop *algebra.Stop, done <-chan error) error {
	clock := time.NewTimer(s.budget.Time)
	defer clock.Stop()
	memory := newWatchdog(s.budget.Memory)
	defer memory.close()
	select {
	case err := <-done:
		return err
	case <-ctx.Done():
		stop.Pull(algebra.Errorf(algebra.Interrupted, "interrupted"))
	case <-clock.C:
		stop.Pull(algebra.Errorf(algebra.TooLarge, "the cell took longer than its budget of %s", s.budget.Time).
			WithRemedy("start the kernel with a larger budget, or ask for less at once"))
	case <-memory.exceeded():
		stop.Pull(algebra.Errorf(algebra.TooLarge, "the cell took more memory than its budget of %d MiB", s.budget.Memory>>20).
			WithRemedy("start the kernel with a larger budget, or ask for less at once"))
	}
	select {
	case err := <-done:
		if err != nil {
			return err
		}
	case <-time.After(grace):
	}
	return stop.Cause()
}

// guarded turns the panics of work into errors: an unwinding into its cause,
// and a defect into an error that asks for a report.
func guarded(c *cell, work func(*cell) error) (err error) {
	defer func() {
		if r := recover(); r != nil {
			err = &fault{
				at: c.place(), name: nameDefect,
				reason: fmt.Sprintf("a defect in Adjoin, not in the cell: %v (in %s)", r, culprit(debug.Stack())),
				remedy: "the session is intact; please report this line together with the cell",
			}
		}
	}()
	return caught(c, work)
}

func caught(c *cell, work func(*cell) error) (err error) {
	defer algebra.Catch(&err)
	return work(c)
}

// gate hands what a cell shows to the sink until the cell has ended.
type gate struct {
	mu     sync.Mutex
	closed bool
	out    Sink
}

func (g *gate) emit(f func(Sink)) {
	g.mu.Lock()
	defer g.mu.Unlock()
	if !g.closed {
		f(g.out)
	}
}

func (g *gate) close() {
	g.mu.Lock()
	defer g.mu.Unlock()
	g.closed = true
}
