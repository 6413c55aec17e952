package kernel

import (
	"encoding/json"
	"reflect"
	"slices"
	"testing"
	"time"

	"adjoin/kernel/wire"
)

func ask(t *testing.T, kind string, content, answer any) {
	t.Helper()
	c := connect(t, inMemory(t), nil)
	if err := c.Ask(limit(t, 5*time.Second), false, kind, content, answer); err != nil {
		t.Fatal(err)
	}
}

// Characters outside the basic plane before and after the cursor.
func TestCompleteCountsCodePoints(t *testing.T) {
	var a wire.CompleteReply
	ask(t, "complete_request", wire.CompleteRequest{Code: "𝔽😀 α𝔽bc", Cursor: 6}, &a)
	want := wire.CompleteReply{
		Status: "ok", Matches: []string{"α𝔽bα𝔽b"}, Start: 3, End: 6,
		Metadata: wire.CompletionMetadata{Types: []wire.CompletionType{{Start: 3, End: 6, Text: "α𝔽bα𝔽b", Type: "name", Signature: "()"}}},
	}
	if !reflect.DeepEqual(a, want) {
		t.Errorf("%+v", a)
	}
}

func TestInspect(t *testing.T) {
	var a wire.InspectReply
	ask(t, "inspect_request", wire.InspectRequest{Code: "😀ab", Cursor: 2}, &a)
	if !a.Found || a.Data["text/plain"] != "😀a" || a.Metadata == nil {
		t.Errorf("%+v", a)
	}
	ask(t, "inspect_request", wire.InspectRequest{Code: "x"}, &a)
	if a.Found || a.Status != "ok" || a.Data == nil {
		t.Errorf("%+v", a)
	}
}

func TestIsComplete(t *testing.T) {
	for code, want := range map[string]string{
		"x":  `{"status":"complete"}`,
		"f(": `{"status":"incomplete","indent":"  "}`,
		")":  `{"status":"invalid"}`,
	} {
		var a json.RawMessage
		ask(t, "is_complete_request", wire.IsCompleteRequest{Code: code}, &a)
		if string(a) != want {
			t.Errorf("%q: %s", code, a)
		}
	}
}

func TestCommsAreRefused(t *testing.T) {
	k := inMemory(t)
	var seen recorder
	c := connect(t, k, seen.tap)
	if _, err := c.Send(false, "comm_open", map[string]any{"comm_id": "7", "target_name": "w", "data": map[string]any{}}); err != nil {
		t.Fatal(err)
	}
	waitFor(t, func() bool {
		all := seen.all()
		return len(all) > 0 && state(all[len(all)-1]) == wire.Idle
	})
	i := slices.IndexFunc(seen.all(), func(m *wire.Message) bool { return m.Header.Type == "comm_close" })
	var closed wire.Comm
	if i < 0 || json.Unmarshal(seen.all()[i].Content, &closed) != nil || closed.ID != "7" {
		t.Errorf("comm_close: %+v", closed)
	}
	var info wire.CommInfoReply
	if err := c.Ask(limit(t, 5*time.Second), false, "comm_info_request", struct{}{}, &info); err != nil || info.Comms == nil || len(info.Comms) > 0 {
		t.Errorf("%+v %v", info, err)
	}
}

func TestUnknownTypesGetBusyAndIdle(t *testing.T) {
	k := inMemory(t)
	var seen recorder
	c := connect(t, k, seen.tap)
	for _, control := range []bool{false, true} {
		p, err := c.Send(control, "unheard_of_request", struct{}{})
		if err != nil {
			t.Fatal(err)
		}
		waitFor(t, func() bool {
			var states []string
			for _, m := range seen.all() {
				if m.ParentHeader().ID == p.ID {
					states = append(states, state(m))
				}
			}
			return reflect.DeepEqual(states, []string{"busy", "idle"})
		})
	}
}

func TestMalformedContent(t *testing.T) {
	c := connect(t, inMemory(t), nil)
	for _, kind := range []string{"execute_request", "complete_request", "inspect_request", "is_complete_request", "history_request"} {
		var a wire.ErrorReply
		if err := c.Ask(limit(t, 5*time.Second), false, kind, map[string]any{"code": 1, "hist_access_type": 2}, &a); err != nil {
			t.Fatal(err)
		}
		if a.Status != "error" || a.Name != "Malformed" {
			t.Errorf("%s: %+v", kind, a)
		}
	}
}

func TestUsage(t *testing.T) {
	var a Usage
	ask(t, "usage_request", struct{}{}, &a)
	if a.PID == 0 || a.Memory < 1<<20 || a.CPUs == 0 {
		t.Errorf("%+v", a)
	}
}

func TestSubshellsAreRefused(t *testing.T) {
	var a wire.ErrorReply
	ask(t, "create_subshell_request", struct{}{}, &a)
	if a.Status != "error" || a.Name != "Unsupported" {
		t.Errorf("%+v", a)
	}
}
