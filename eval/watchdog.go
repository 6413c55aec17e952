package eval

import (
	"runtime/metrics"
	"time"
)

// watchdog samples the size of the heap while a cell runs.
type watchdog struct {
	limit  uint64
	ticker *time.Ticker
	sound  chan struct{}
	end    chan struct{}
}

const sampling = 20 * time.Millisecond

func newWatchdog(growth int64) *watchdog {
	d := &watchdog{
		limit: heap() + uint64(growth), ticker: time.NewTicker(sampling),
		sound: make(chan struct{}), end: make(chan struct{}),
	}
	go d.run()
	return d
}

func (d *watchdog) exceeded() <-chan struct{} { return d.sound }

func (d *watchdog) close() {
	d.ticker.Stop()
	close(d.end)
}

func (d *watchdog) run() {
	for {
		select {
		case <-d.end:
			return
		case <-d.ticker.C:
			if heap() > d.limit {
				close(d.sound)
				return
			}
		}
	}
}

// heap is how many bytes the objects on the heap take, dead ones that have not
// been swept included.
func heap() uint64 {
	sample := []metrics.Sample{{Name: "/memory/classes/heap/objects:bytes"}}
	metrics.Read(sample)
	return sample[0].Value.Uint64()
}
