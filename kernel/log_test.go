package kernel

import (
	"log"
	"strings"
	"testing"
	"time"
)

func TestLogIsSparing(t *testing.T) {
	var out strings.Builder
	now := time.Unix(0, 0)
	l := log.New(&sparing{w: &out, now: func() time.Time { return now }}, "", 0)
	for range 10 * logged {
		l.Print("line")
	}
	if n := strings.Count(out.String(), "line\n"); n != logged {
		t.Errorf("%d lines", n)
	}
	now = now.Add(time.Minute)
	l.Print("after")
	if s := out.String(); !strings.HasSuffix(s, "900 lines were left out here\nafter\n") {
		t.Errorf("%q", s[len(s)-60:])
	}
}
