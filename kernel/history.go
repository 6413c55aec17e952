package kernel

import (
	"bufio"
	"bytes"
	"encoding/json"
	"io"
	"os"
	"path/filepath"
	"strings"
	"sync"
	"unicode/utf8"

	"adjoin/kernel/wire"
)

// History keeps the inputs of this session and of earlier ones, across
// processes, in a file of JSON lines that is only ever appended to. Sessions
// are numbered in the order in which they first appear in the file; each line
// names its session by a random word, so that kernels that run side by side do
// not mix.
type History struct {
	path string

	mu      sync.Mutex
	loaded  bool
	earlier []entry
	current []entry
	number  int // of this session
	word    string
	unsaved []record
}

type entry struct {
	session, line int
	input, output string
}

// record is a line of the file.
type record struct {
	Session string `json:"session"`
	Line    int    `json:"line"`
	Input   string `json:"input"`
	Output  string `json:"output,omitempty"`
}

const (
	maxEntries  = 10_000  // kept of a session, and of all earlier ones
	maxHistory  = 4 << 20 // bytes of the file that are read, from its end
	maxRecorded = 1 << 12 // bytes of an output that are kept
)

// NewHistory keeps the history in the file at path, which need not exist; with
// an empty path nothing outlives the process. The file is read when it is first
// needed.
func NewHistory(path string) *History {
	return &History{path: path, number: 1, word: newID()[:12]}
}

// DefaultHistory is where the history of this user is: the file that the
// environment variable ADJOIN_HISTORY names, nowhere when that is "none", and
// otherwise a file in the user's folder for such things.
func DefaultHistory() string {
	switch p := os.Getenv("ADJOIN_HISTORY"); p {
	case "":
	case "none":
		return ""
	default:
		return p
	}
	dir := os.Getenv("XDG_STATE_HOME")
	if dir == "" {
		var err error
		if dir, err = os.UserConfigDir(); err != nil {
			return ""
		}
	}
	return filepath.Join(dir, "adjoin", "history.jsonl")
}

// Add keeps a cell of this session.
func (h *History) Add(line int, input, output string) {
	h.mu.Lock()
	defer h.mu.Unlock()
	output = cut(output, maxRecorded)
	h.current = append(h.current, entry{line: line, input: input, output: output})
	if len(h.current) > maxEntries {
		h.current = h.current[len(h.current)-maxEntries:]
	}
	if h.path != "" {
		h.unsaved = append(h.unsaved, record{h.word, line, input, output})
	}
}

// cut is the beginning of s, at most n bytes.
func cut(s string, n int) string {
	if len(s) <= n {
		return s
	}
	for n > 0 && !utf8.RuneStart(s[n]) {
		n--
	}
	return s[:n] + " ..."
}

// Flush writes what is not in the file yet. A history that cannot be written
// is no reason to bother anybody who computes.
func (h *History) Flush() {
	h.mu.Lock()
	defer h.mu.Unlock()
	if len(h.unsaved) == 0 {
		return
	}
	h.load() // numbers this session after those that are there now
	var b bytes.Buffer
	for _, r := range h.unsaved {
		if line, err := wire.Marshal(r); err == nil {
			b.Write(line)
			b.WriteByte('\n')
		}
	}
	h.unsaved = nil
	if os.MkdirAll(filepath.Dir(h.path), 0o700) != nil {
		return
	}
	f, err := os.OpenFile(h.path, os.O_APPEND|os.O_CREATE|os.O_WRONLY, 0o600)
	if err != nil {
		return
	}
	defer f.Close()
	_, _ = f.Write(b.Bytes()) // in one piece, which others' pieces do not part
}

// load reads the file, once; h.mu is held.
func (h *History) load() {
	if h.loaded {
		return
	}
	h.loaded = true
	if h.path == "" {
		return
	}
	f, err := os.Open(h.path)
	if err != nil {
		return
	}
	defer f.Close()
	if info, err := f.Stat(); err == nil && info.Size() > maxHistory {
		_, _ = f.Seek(-maxHistory, io.SeekEnd)
	}
	numbers := map[string]int{}
	lines := bufio.NewScanner(f)
	lines.Buffer(nil, maxHistory)
	for lines.Scan() {
		var r record
		if json.Unmarshal(lines.Bytes(), &r) != nil || r.Session == "" || r.Session == h.word {
			continue // the first line may be half a line
		}
		if numbers[r.Session] == 0 {
			numbers[r.Session] = len(numbers) + 1
		}
		h.earlier = append(h.earlier, entry{numbers[r.Session], r.Line, r.Input, r.Output})
	}
	if len(h.earlier) > maxEntries {
		h.earlier = h.earlier[len(h.earlier)-maxEntries:]
	}
	h.number = len(numbers) + 1
}

// answer is what a history request asks for, oldest first.
func (h *History) answer(q wire.HistoryRequest) [][3]any {
	h.mu.Lock()
	defer h.mu.Unlock()
	h.load()
	var found []entry
	switch q.Access {
	case "range":
		found = h.lines(q)
	case "search":
		found = matching(h.all(), q.Pattern)
		if q.Unique {
			found = unique(found)
		}
		found = last(found, q.N)
	default:
		found = last(h.all(), q.N)
	}
	out := make([][3]any, 0, len(found))
	for _, e := range found {
		a := [3]any{e.session, e.line, e.input}
		if q.Output {
			a[2] = [2]any{e.input, nil}
			if e.output != "" {
				a[2] = [2]any{e.input, e.output}
			}
		}
		out = append(out, a)
	}
	return out
}

// Inputs are all inputs that are kept, oldest first.
func (h *History) Inputs() []string {
	h.mu.Lock()
	defer h.mu.Unlock()
	h.load()
	var inputs []string
	for _, e := range h.all() {
		inputs = append(inputs, e.input)
	}
	return inputs
}

func (h *History) all() []entry {
	all := make([]entry, 0, len(h.earlier)+len(h.current))
	all = append(all, h.earlier...)
	for _, e := range h.current {
		e.session = h.number
		all = append(all, e)
	}
	return all
}

// lines are those of one session from start up to and without stop. Session 0
// is this one, -1 the one before it, and so on.
func (h *History) lines(q wire.HistoryRequest) []entry {
	session := q.Session
	if session <= 0 {
		session += h.number
	}
	var found []entry
	for _, e := range h.all() {
		if e.session == session && e.line >= q.Start && (q.Stop == nil || e.line < *q.Stop) {
			found = append(found, e)
		}
	}
	return found
}

func last(e []entry, n *int) []entry {
	if n == nil || *n < 0 || *n >= len(e) {
		return e
	}
	return e[len(e)-*n:]
}

// unique keeps the latest of equal inputs.
func unique(e []entry) []entry {
	at := map[string]int{}
	for i, x := range e {
		at[x.input] = i
	}
	var kept []entry
	for i, x := range e {
		if at[x.input] == i {
			kept = append(kept, x)
		}
	}
	return kept
}

func matching(e []entry, pattern string) []entry {
	if pattern == "" {
		pattern = "*"
	}
	var kept []entry
	for _, x := range e {
		if matches(pattern, x.input) {
			kept = append(kept, x)
		}
	}
	return kept
}

// matches says whether the whole of s fits the pattern, in which * stands for
// any text and ? for any one character.
func matches(pattern, s string) bool {
	p, t := []rune(pattern), []rune(strings.TrimSpace(s))
	star, mark := -1, 0
	i, j := 0, 0
	for j < len(t) {
		switch {
		case i < len(p) && p[i] == '*':
			star, mark = i, j
			i++
		case i < len(p) && (p[i] == '?' || p[i] == t[j]):
			i++
			j++
		case star >= 0:
			mark++
			i, j = star+1, mark
		default:
			return false
		}
	}
	for i < len(p) && p[i] == '*' {
		i++
	}
	return i == len(p)
}
