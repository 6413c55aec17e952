package kernel

import (
	"encoding/json"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"sync"
	"testing"

	"adjoin/kernel/wire"
)

func TestHistoryAcrossSessions(t *testing.T) {
	path := filepath.Join(t.TempDir(), "deep", "history.jsonl")
	first := NewHistory(path)
	first.Add(1, "6*7", "42")
	first.Add(2, "say 1", "")
	first.Flush()
	second := NewHistory(path)
	second.Add(1, "6*7", "42")
	second.Add(2, "let a = 1\na", "1")
	second.Flush()
	third := NewHistory(path)
	third.Add(1, "𝔽_8", "")

	for _, c := range []struct {
		q    wire.HistoryRequest
		want string
	}{
		{wire.HistoryRequest{Access: "tail"}, `[[1 1 6*7] [1 2 say 1] [2 1 6*7] [2 2 let a = 1|a] [3 1 𝔽_8]]`},
		{wire.HistoryRequest{Access: "tail", N: ptr(2)}, `[[2 2 let a = 1|a] [3 1 𝔽_8]]`},
		{wire.HistoryRequest{Access: "tail", N: ptr(0)}, `[]`},
		{wire.HistoryRequest{Access: "tail", N: ptr(1), Output: true}, `[[3 1 [𝔽_8 <nil>]]]`},
		{wire.HistoryRequest{Access: "range", Session: 1, Start: 1, Stop: ptr(2)}, `[[1 1 6*7]]`},
		{wire.HistoryRequest{Access: "range", Session: 2, Start: 1, Output: true}, `[[2 1 [6*7 42]] [2 2 [let a = 1|a 1]]]`},
		{wire.HistoryRequest{Access: "range", Session: 0}, `[[3 1 𝔽_8]]`},
		{wire.HistoryRequest{Access: "range", Session: -1, Start: 2}, `[[2 2 let a = 1|a]]`},
		{wire.HistoryRequest{Access: "range", Session: 9}, `[]`},
		{wire.HistoryRequest{Access: "search", Pattern: "6?7"}, `[[1 1 6*7] [2 1 6*7]]`},
		{wire.HistoryRequest{Access: "search", Pattern: "6?7", Unique: true}, `[[2 1 6*7]]`},
		{wire.HistoryRequest{Access: "search", Pattern: "*a*", N: ptr(1)}, `[[2 2 let a = 1|a]]`},
		{wire.HistoryRequest{Access: "search", Pattern: "?_8"}, `[[3 1 𝔽_8]]`},
		{wire.HistoryRequest{Access: "search", Pattern: "nowhere"}, `[]`},
	} {
		got := strings.ReplaceAll(fmt.Sprint(third.answer(c.q)), "\n", "|")
		if got != c.want {
			t.Errorf("%+v: %s, want %s", c.q, got, c.want)
		}
	}
	if info, err := os.Stat(path); err != nil || info.Mode().Perm()&0o077 != 0 {
		t.Errorf("others may read it: %v %v", info.Mode(), err)
	}
}

func TestHistorySurvivesDamage(t *testing.T) {
	path := filepath.Join(t.TempDir(), "history.jsonl")
	good, _ := json.Marshal(record{"w", 1, "kept", ""})
	if err := os.WriteFile(path, []byte("half a line\"}\n{}\n\xff\xfe\n"+string(good)+"\n{\"session\":"), 0o600); err != nil {
		t.Fatal(err)
	}
	if got := fmt.Sprint(NewHistory(path).answer(wire.HistoryRequest{})); got != "[[1 1 kept]]" {
		t.Error(got)
	}
	unwritable := NewHistory(filepath.Join(path, "below a file"))
	unwritable.Add(1, "x", "")
	unwritable.Flush()
	if got := fmt.Sprint(unwritable.answer(wire.HistoryRequest{})); got != "[[1 1 x]]" {
		t.Error(got)
	}
}

func TestHistoryOfKernelsSideBySide(t *testing.T) {
	path := filepath.Join(t.TempDir(), "history.jsonl")
	var all sync.WaitGroup
	for i := range 4 {
		all.Go(func() {
			h := NewHistory(path)
			for k := range 50 {
				h.Add(k+1, fmt.Sprintf("%d %s", i, strings.Repeat("x", 1000)), "")
				h.Flush()
			}
		})
	}
	all.Wait()
	got := NewHistory(path).answer(wire.HistoryRequest{Access: "search", Pattern: "? x*"})
	if len(got) != 200 {
		t.Errorf("%d of 200 lines are there", len(got))
	}
	of := map[any]byte{} // session to the kernel that wrote it
	for _, e := range got {
		writer := e[2].(string)[0]
		if of[e[0]] != 0 && of[e[0]] != writer {
			t.Fatal("sessions are mixed")
		}
		of[e[0]] = writer
	}
}

func TestMatches(t *testing.T) {
	for _, c := range []struct {
		pattern, s string
		want       bool
	}{
		{"", "", true}, {"*", "", true}, {"?", "", false}, {"a*c", "abbc", true}, {"a*c", "abb", false},
		{"*a*b*", "xaxbx", true}, {"a?c", "aéc", true}, {"a", "ab", false}, {"***", "x", true}, {"*ab", "aab", true},
	} {
		if matches(c.pattern, c.s) != c.want {
			t.Errorf("%q %q", c.pattern, c.s)
		}
	}
}

func TestDefaultHistory(t *testing.T) {
	t.Setenv("XDG_STATE_HOME", "/state")
	for value, want := range map[string]string{"": "/state/adjoin/history.jsonl", "none": "", "/else/where": "/else/where"} {
		t.Setenv("ADJOIN_HISTORY", value)
		if got := DefaultHistory(); got != filepath.FromSlash(want) {
			t.Errorf("%q: %q", value, got)
		}
	}
}
