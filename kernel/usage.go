package kernel

import (
	"os"
	"runtime"
	"sync"
	"time"
)

// Usage is the answer to usage_request, a message that the resource panels of
// notebook servers send: what the kernel takes of the machine.
type Usage struct {
	Status   string      `json:"status"`
	Hostname string      `json:"hostname"`
	PID      int         `json:"pid"`
	CPU      float64     `json:"kernel_cpu"`    // percent of one processor since the last question
	Memory   int64       `json:"kernel_memory"` // bytes
	CPUs     int         `json:"cpu_count"`
	Host     *HostMemory `json:"host_virtual_memory,omitempty"`
}

// HostMemory is the memory of the machine, in bytes.
type HostMemory struct {
	Total     int64   `json:"total"`
	Available int64   `json:"available"`
	Percent   float64 `json:"percent"` // taken
}

// usage measures from one question to the next.
type usage struct {
	mu   sync.Mutex
	at   time.Time
	used time.Duration
}

func (u *usage) start() { u.at, u.used = time.Now(), processorTime() }

func (u *usage) measure() Usage {
	u.mu.Lock()
	defer u.mu.Unlock()
	now, used := time.Now(), processorTime()
	a := Usage{Status: "ok", PID: os.Getpid(), CPUs: runtime.NumCPU(), Memory: residentMemory(), Host: hostMemory()}
	a.Hostname, _ = os.Hostname()
	if d := now.Sub(u.at); d > 0 {
		a.CPU = 100 * float64(used-u.used) / float64(d)
	}
	u.at, u.used = now, used
	return a
}

// heapMemory is what the runtime has from the system, where that is all we can
// know.
func heapMemory() int64 {
	var m runtime.MemStats
	runtime.ReadMemStats(&m)
	return int64(m.Sys - m.HeapReleased)
}
