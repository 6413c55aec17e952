package kernel

import (
	"encoding/json"
	"fmt"
	"math/rand/v2"
	"slices"
	"strings"
	"sync"
	"testing"
	"time"

	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

func state(m *wire.Message) string {
	var s wire.KernelStatus
	if m.Header.Type != "status" || json.Unmarshal(m.Content, &s) != nil {
		return ""
	}
	return s.State
}

func TestOrderOfOneCell(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	for code, want := range map[string]string{
		"":                               "busy execute_input idle",
		"result 1":                       "busy execute_input execute_result idle",
		"say a\nshow b\nsay c\nresult d": "busy execute_input stream display_data stream execute_result idle",
		"say a\nsay b\nwarn c\nsay d":    "busy execute_input stream stream stream stream idle",
		"say a\nfail":                    "busy execute_input stream error idle",
		"say a\nclear\nshow b":           "busy execute_input stream clear_output display_data idle",
		"page x":                         "busy execute_input idle",
		"panic":                          "busy execute_input error idle",
		"say a\npanic":                   "busy execute_input stream error idle",
	} {
		got := run(t, c, wire.ExecuteRequest{Code: code})
		kinds := strings.Join(got.kinds, " ")
		// Text may or may not be collected, which depends on the clock.
		squeeze := func(s string) string {
			for strings.Contains(s, "stream stream") {
				s = strings.ReplaceAll(s, "stream stream", "stream")
			}
			return s
		}
		if squeeze(kinds) != squeeze(want) {
			t.Errorf("%q: %s, want %s", code, kinds, want)
		}
	}
}

// The rules of the desk, on everything that one subscriber sees while three
// clients do random things. Seeds are fixed and printed.
func TestOrderUnderLoad(t *testing.T) {
	for seed := range uint64(4) {
		t.Run(fmt.Sprintf("seed %d", seed), func(t *testing.T) {
			k := inMemory(t)
			var seen recorder
			observer := connect(t, k, seen.tap)
			var all sync.WaitGroup
			for i := range uint64(3) {
				c := connect(t, k, nil)
				all.Go(func() { misbehave(t, c, rand.New(rand.NewPCG(seed, i))) })
			}
			all.Wait()
			// When the observer has seen this, it has seen all before it.
			if err := observer.Ask(limit(t, 30*time.Second), false, "kernel_info_request", struct{}{}, new(wire.Reply)); err != nil {
				t.Fatal(err)
			}
			checkOrder(t, seen.all())
		})
	}
}

// misbehave sends random requests, some without waiting for the answer.
func misbehave(t *testing.T, c *client.Client, r *rand.Rand) {
	cells := []string{"say a\nsay b", "say a\nshow b\nresult c", "fail", "panic", "sleep 2ms", "warn x\nfail", "flood 50 100", "sleep 1h\nsay never", ""}
	requests := []string{"kernel_info_request", "complete_request", "inspect_request", "is_complete_request", "history_request",
		"comm_info_request", "comm_open", "interrupt_request", "unheard_of_request", "usage_request"}
	var pending []*client.Pending
	for range 60 {
		var p *client.Pending
		var err error
		if r.IntN(2) == 0 {
			code := cells[r.IntN(len(cells))]
			stop := r.IntN(2) == 0
			p, err = c.Send(false, "execute_request", wire.ExecuteRequest{Code: code, Silent: r.IntN(8) == 0, StopOnError: &stop})
		} else {
			kind := requests[r.IntN(len(requests))]
			control := r.IntN(2) == 0
			p, err = c.Send(control, kind, map[string]any{"code": "panic", "cursor_pos": r.IntN(7)})
			if !strings.HasSuffix(kind, "_request") || kind == "unheard_of_request" {
				continue // no reply comes
			}
		}
		if err != nil {
			t.Error(err)
			return
		}
		pending = append(pending, p)
		if r.IntN(3) == 0 {
			time.Sleep(time.Duration(r.IntN(3)) * time.Millisecond)
		}
	}
	stop := make(chan struct{})
	var interrupts sync.WaitGroup
	interrupts.Go(func() { // that cell ends only when it is interrupted
		for {
			select {
			case <-stop:
				return
			case <-time.After(5 * time.Millisecond):
				if p, err := c.Send(true, "interrupt_request", struct{}{}); err == nil {
					p.Forget()
				}
			}
		}
	})
	for _, p := range pending {
		if _, err := p.Wait(limit(t, 30*time.Second), nil); err != nil {
			t.Error(err)
			break
		}
	}
	close(stop)
	interrupts.Wait()
	for _, control := range []bool{false, true} { // when this is answered, all before it has been
		if err := c.Ask(limit(t, 30*time.Second), control, "kernel_info_request", struct{}{}, new(wire.Reply)); err != nil {
			t.Error(err)
		}
	}
}

func checkOrder(t *testing.T, all []*wire.Message) {
	t.Helper()
	open := map[string]bool{}   // between busy and idle
	closed := map[string]bool{} // after idle
	var running []string        // cells between execute_input and idle
	latest := ""
	ids := map[string]bool{}
	for i, m := range all {
		if ids[m.Header.ID] {
			t.Fatalf("message id %s is used twice", m.Header.ID)
		}
		ids[m.Header.ID] = true
		parent := m.ParentHeader()
		id := parent.ID
		if s := state(m); s != "" {
			latest = s
		}
		switch {
		case m.Header.Type == "iopub_welcome" || state(m) == wire.Starting:
		case id == "":
			t.Fatalf("message %d, a %s, has no parent", i, m.Header.Type)
		case closed[id]:
			t.Fatalf("message %d, a %s, comes after the idle of its %s", i, m.Header.Type, parent.Type)
		case state(m) == wire.Busy:
			open[id] = true
		case !open[id]:
			t.Fatalf("message %d, a %s, comes before the busy of its %s", i, m.Header.Type, parent.Type)
		case state(m) == wire.Idle:
			closed[id] = true
			running = slices.DeleteFunc(running, func(s string) bool { return s == id })
			next := slices.IndexFunc(all[i+1:], func(m *wire.Message) bool { return state(m) != "" })
			if len(running) > 0 && (next < 0 || state(all[i+1+next]) != wire.Busy) {
				t.Fatalf("message %d: idle while a cell runs, and no busy after it", i)
			}
		case m.Header.Type == "execute_input":
			running = append(running, id)
		}
		if len(running) > 1 {
			t.Fatalf("message %d: two cells run", i)
		}
	}
	for id := range open {
		if !closed[id] {
			t.Errorf("no idle for %s", id)
		}
	}
	if latest != wire.Idle {
		t.Errorf("in the end the kernel is %s", latest)
	}
	if len(closed) < 50 {
		t.Errorf("only %d requests were seen", len(closed))
	}
}

func TestAsideWhileACellRuns(t *testing.T) {
	k := inMemory(t)
	var seen recorder
	c := connect(t, k, seen.tap)
	p, err := c.Send(false, "execute_request", code("say begun\nspin"))
	if err != nil {
		t.Fatal(err)
	}
	waitFor(t, func() bool {
		return slices.ContainsFunc(seen.all(), func(m *wire.Message) bool { return m.Header.Type == "stream" })
	})
	for _, kind := range []string{"kernel_info_request", "complete_request", "inspect_request", "is_complete_request", "history_request", "comm_info_request"} {
		for _, control := range []bool{false, true} {
			var a wire.Reply
			if err := c.Ask(limit(t, 2*time.Second), control, kind, map[string]any{"code": "a", "cursor_pos": 1}, &a); err != nil || a.Status == "" || a.Status == "error" {
				t.Errorf("%s while a cell runs: %+v %v", kind, a, err)
			}
		}
	}
	// The busy that follows the last idle may come after the reply.
	waitFor(t, func() bool { all := seen.all(); return state(all[len(all)-1]) == wire.Busy })
	k.Interrupt()
	if got := finish(t, p); got.reply.Name != "Interrupted" {
		t.Errorf("%+v", got.reply)
	}
	all := seen.all()
	if state(all[len(all)-1]) != wire.Idle {
		t.Error("not idle in the end")
	}
}

// waitFor waits until what must become true is true.
func waitFor(t testing.TB, true func() bool) {
	t.Helper()
	for end := time.Now().Add(5 * time.Second); !true(); time.Sleep(time.Millisecond) {
		if time.Now().After(end) {
			t.Fatal("it does not become true")
		}
	}
}
