package kernel

import (
	"bufio"
	"fmt"
	"os"
	"syscall"
	"time"
)

func processorTime() time.Duration {
	var r syscall.Rusage
	if syscall.Getrusage(syscall.RUSAGE_SELF, &r) != nil {
		return 0
	}
	return time.Duration(r.Utime.Nano() + r.Stime.Nano())
}

func residentMemory() int64 {
	var size, resident int64
	b, err := os.ReadFile("/proc/self/statm")
	if err != nil {
		return heapMemory()
	}
	if _, err := fmt.Sscan(string(b), &size, &resident); err != nil {
		return heapMemory()
	}
	return resident * int64(os.Getpagesize())
}

func hostMemory() *HostMemory {
	f, err := os.Open("/proc/meminfo")
	if err != nil {
		return nil
	}
	defer f.Close()
	m := &HostMemory{}
	for lines := bufio.NewScanner(f); lines.Scan(); {
		var kilobytes int64
		if n, _ := fmt.Sscanf(lines.Text(), "MemTotal: %d kB", &kilobytes); n == 1 {
			m.Total = kilobytes << 10
		} else if n, _ := fmt.Sscanf(lines.Text(), "MemAvailable: %d kB", &kilobytes); n == 1 {
			m.Available = kilobytes << 10
		}
	}
	if m.Total == 0 {
		return nil
	}
	m.Percent = 100 * float64(m.Total-m.Available) / float64(m.Total)
	return m
}
