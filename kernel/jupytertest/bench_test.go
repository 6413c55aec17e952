package jupytertest

import (
	"bufio"
	"fmt"
	"os"
	"slices"
	"strings"
	"testing"
	"time"
)

// Process start to the first kernel_info_reply.
func BenchmarkStart(b *testing.B) {
	program(b)
	for b.Loop() {
		s := start(b)
		b.StopTimer()
		s.stop()
		b.StartTimer()
	}
}

// Memory at rest, after one cell, in megabytes: VmRSS of proc_pid_status(5).
func BenchmarkMemoryAtRest(b *testing.B) {
	s := start(b)
	s.run(b, "1+1")
	for b.Loop() {
		time.Sleep(time.Second)
	}
	f, err := os.Open(fmt.Sprintf("/proc/%d/status", s.process.Process.Pid))
	if err != nil {
		b.Skip(err)
	}
	defer f.Close()
	for lines := bufio.NewScanner(f); lines.Scan(); {
		var kilobytes float64
		if _, err := fmt.Sscanf(strings.TrimPrefix(lines.Text(), "VmRSS:"), "%f kB", &kilobytes); err == nil && strings.HasPrefix(lines.Text(), "VmRSS:") {
			b.ReportMetric(kilobytes/1000, "MB")
			return
		}
	}
	b.Fatal("no VmRSS")
}

// A cell from request to reply and idle over TCP: the mean, and the median.
func BenchmarkRoundTrip(b *testing.B) {
	s := start(b)
	var took []time.Duration
	for b.Loop() {
		begun := time.Now()
		s.run(b, "1+1")
		took = append(took, time.Since(begun))
	}
	slices.Sort(took)
	b.ReportMetric(float64(took[len(took)/2].Microseconds())/1000, "ms-p50")
}
