package kernel

import (
	"encoding/json"
	"fmt"
	"strings"
	"sync"
	"testing"
	"time"

	"adjoin/kernel/client"
	"adjoin/kernel/wire"
)

func ptr[T any](v T) *T { return &v }

func TestCountAndSilence(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	for i, step := range []struct {
		q     wire.ExecuteRequest
		count int
		kinds string
	}{
		{code("result a"), 1, "busy execute_input execute_result idle"},
		{wire.ExecuteRequest{Code: "result a\nsay b", Silent: true}, 1, "busy idle"},
		{wire.ExecuteRequest{Code: "fail", Silent: true}, 1, "busy idle"},
		{wire.ExecuteRequest{Code: "result a", StoreHistory: ptr(false)}, 1, "busy execute_input execute_result idle"},
		{code("fail"), 2, "busy execute_input error idle"},
		{code(""), 3, "busy execute_input idle"},
	} {
		got := run(t, c, step.q)
		if got.reply.Count != step.count || strings.Join(got.kinds, " ") != step.kinds {
			t.Errorf("step %d: count %d, %v", i, got.reply.Count, got.kinds)
		}
	}
	var h wire.HistoryReply
	if err := c.Ask(limit(t, 5*time.Second), false, "history_request", wire.HistoryRequest{Access: "tail"}, &h); err != nil {
		t.Fatal(err)
	}
	if got := fmt.Sprint(h.History); got != "[[1 1 result a] [1 2 fail] [1 3 ]]" {
		t.Errorf("history: %s", got)
	}
}

func TestSilentFailureIsTold(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	got := run(t, c, wire.ExecuteRequest{Code: "fail", Silent: true})
	if got.reply.Status != "error" || got.reply.Name != "Unknown" || got.reply.Value != "the reason" {
		t.Errorf("%+v", got.reply)
	}
}

func TestUserExpressions(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	q := wire.ExecuteRequest{Code: "say x", UserExpressions: map[string]string{"good": "7", "bad": "seven"}}
	got := run(t, c, q)
	if s := string(got.reply.UserExpressions["good"]); s != `{"status":"ok","data":{"text/plain":"7"}}` && !strings.Contains(s, `"data":{"text/plain":"7"}`) {
		t.Errorf("good: %s", s)
	}
	var e wire.ExecuteErrorReply
	if err := json.Unmarshal(got.reply.UserExpressions["bad"], &e); err != nil || e.Status != "error" || e.Name != "NotANumber" {
		t.Errorf("bad: %s", got.reply.UserExpressions["bad"])
	}
	q.Code = "fail"
	if got := run(t, c, q); got.reply.UserExpressions != nil {
		t.Errorf("evaluated after a failure: %v", got.reply.UserExpressions)
	}
}

func TestPages(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	got := run(t, c, code("page about this"))
	if len(got.reply.Payload) != 1 || got.reply.Payload[0].Source != "page" || got.reply.Payload[0].Data["text/plain"] != "about this" {
		t.Errorf("%+v", got.reply.Payload)
	}
	if got := run(t, c, code("say x")); got.reply.Payload == nil {
		t.Error("payload is not a list")
	}
}

// sendAll sends cells in one go.
func sendAll(t *testing.T, c *client.Client, cells ...wire.ExecuteRequest) []*client.Pending {
	t.Helper()
	var all []*client.Pending
	for _, q := range cells {
		p, err := c.Send(false, "execute_request", q)
		if err != nil {
			t.Fatal(err)
		}
		all = append(all, p)
	}
	return all
}

func TestFailureDropsWhatWaits(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	for range 20 {
		all := sendAll(t, c, code("say 1"), code("fail"), code("say 3"), code("say 4"))
		var got []string
		for _, p := range all {
			r := finish(t, p)
			got = append(got, r.reply.Status+r.reply.Name)
			if r.kinds[0] != "busy" || r.kinds[len(r.kinds)-1] != "idle" {
				t.Errorf("%v", r.kinds)
			}
		}
		if s := strings.Join(got, " "); s != "ok errorUnknown errorCancelled errorCancelled" {
			t.Fatal(s)
		}
		if r := run(t, c, code("say 5")); r.reply.Status != "ok" {
			t.Fatalf("the next cell: %+v", r.reply)
		}
	}
}

// A notebook server passes on a long notebook cell by cell.
func TestFailureDropsWhatIsOnItsWay(t *testing.T) {
	c := connect(t, onNetwork(t, Connection{IP: "127.0.0.1"}, Options{quiet: 400 * time.Millisecond}), nil)
	all := sendAll(t, c, code("fail"))
	for range 10 {
		time.Sleep(60 * time.Millisecond)
		all = append(all, sendAll(t, c, code("say late"))...)
	}
	for i, p := range all[1:] {
		if n := finish(t, p).reply.Name; n != "Cancelled" {
			t.Fatalf("cell %d: %q", i+2, n)
		}
	}
}

func TestFailureThatIsMeantDropsNothing(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	all := sendAll(t, c, wire.ExecuteRequest{Code: "fail", StopOnError: ptr(false)}, code("say 2"))
	if finish(t, all[0]).reply.Status != "error" || finish(t, all[1]).reply.Status != "ok" {
		t.Error("the second cell did not run")
	}
}

func TestInterrupt(t *testing.T) {
	k := inMemory(t)
	c := connect(t, k, nil)
	run(t, c, code("let x kept"))
	tries := 100
	if testing.Short() {
		tries = 20
	}
	for i := range tries {
		cells := sendAll(t, c, code("say begun\nspin"), code("say 2"))
		time.Sleep(time.Duration(i%7) * 100 * time.Microsecond) // before the cell has begun, or after
		over := make(chan struct{})
		var asking sync.WaitGroup
		asking.Go(func() {
			for {
				var a wire.Reply
				if err := c.Ask(limit(t, 5*time.Second), true, "interrupt_request", struct{}{}, &a); err != nil || a.Status != "ok" {
					t.Errorf("%+v %v", a, err)
					return
				}
				select {
				case <-over:
					return
				case <-time.After(2 * time.Millisecond): // that one may have come before the cell
				}
			}
		})
		first, second := finish(t, cells[0]), finish(t, cells[1])
		close(over)
		asking.Wait()
		if n := first.reply.Name; n != "Interrupted" && n != "Cancelled" {
			t.Fatalf("the cell: %+v", first.reply)
		}
		if second.reply.Name != "Cancelled" {
			t.Fatalf("the cell that waited: %+v", second.reply)
		}
	}
	if got := run(t, c, code("get x")); got.result != "kept" {
		t.Errorf("%+v", got)
	}
}

func TestInterruptWhenIdle(t *testing.T) {
	k := inMemory(t)
	c := connect(t, k, nil)
	for range 3 {
		k.Interrupt()
		var a wire.Reply
		if err := c.Ask(limit(t, 5*time.Second), true, "interrupt_request", struct{}{}, &a); err != nil {
			t.Fatal(err)
		}
	}
	if got := run(t, c, code("result fine")); got.result != "fine" {
		t.Errorf("%+v", got)
	}
}

func TestInterruptDuringAFlood(t *testing.T) {
	k := inMemory(t)
	c := connect(t, k, nil)
	p, err := c.Send(false, "execute_request", code("flood 100000000 100"))
	if err != nil {
		t.Fatal(err)
	}
	time.Sleep(100 * time.Millisecond)
	k.Interrupt()
	k.Interrupt()
	if got := finish(t, p); got.reply.Name != "Interrupted" {
		t.Errorf("%+v", got.reply)
	}
}

func TestFloodIsWholeAndInFewMessages(t *testing.T) {
	c := connect(t, onNetwork(t, Connection{IP: "127.0.0.1"}, Options{}), nil)
	const n, size = 30_000, 100
	begun := time.Now()
	got := run(t, c, code(fmt.Sprintf("flood %d %d\nresult end", n, size)))
	took := time.Since(begun)
	if len(got.stdout) != n*size || got.result != "end" {
		t.Fatalf("%d bytes, result %q", len(got.stdout), got.result)
	}
	for i := range n {
		if got.stdout[i*size:i*size+8] != fmt.Sprintf("%08d", i) {
			t.Fatalf("line %d is out of place", i)
		}
	}
	if most := 4 + int(took/window) + n*size/maxText + 2; len(got.kinds) > most {
		t.Errorf("%d messages in %v", len(got.kinds), took)
	}
}

func TestDefectsAreSurvived(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	run(t, c, code("let x kept"))
	if got := run(t, c, code("panic")); got.reply.Name != "Defect" || !strings.Contains(got.reply.Value, "please report") {
		t.Errorf("%+v", got.reply)
	}
	var a struct {
		Status string `json:"status"`
		Name   string `json:"ename"`
	}
	if err := c.Ask(limit(t, 5*time.Second), false, "complete_request", wire.CompleteRequest{Code: "panic", Cursor: 5}, &a); err != nil {
		t.Fatal(err)
	}
	if a.Status != "error" || a.Name != "Defect" {
		t.Errorf("%+v", a)
	}
	if got := run(t, c, code("bad")); got.reply.Status != "ok" {
		t.Errorf("a value that is no JSON: %+v", got.reply)
	}
	if got := run(t, c, code("get x")); got.result != "kept" {
		t.Errorf("%+v", got)
	}
}
