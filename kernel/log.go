package kernel

import (
	"fmt"
	"io"
	"log"
	"sync"
	"time"
)

// logged is how many lines a log takes in a minute. Peers without a key can
// cause lines, and must not be able to fill a disk with them.
const logged = 100

// NewLog returns a log that writes to w, and leaves out what is too much.
func NewLog(w io.Writer, prefix string) *log.Logger {
	return log.New(&sparing{w: w, now: time.Now}, prefix, 0)
}

type sparing struct {
	w   io.Writer
	now func() time.Time

	mu      sync.Mutex
	begun   time.Time // of this minute
	written int
	omitted int
}

func (s *sparing) Write(line []byte) (int, error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if now := s.now(); now.Sub(s.begun) >= time.Minute {
		if s.omitted > 0 {
			fmt.Fprintf(s.w, "%d lines were left out here\n", s.omitted)
		}
		s.begun, s.written, s.omitted = now, 0, 0
	}
	if s.written == logged {
		s.omitted++
		return len(line), nil
	}
	s.written++
	return s.w.Write(line)
}
