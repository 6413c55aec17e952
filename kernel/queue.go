package kernel

import (
	"context"
	"errors"
	"sync"
	"time"

	"adjoin/kernel/wire"
)

// queue holds the cells that wait, and the one that runs.
type queue struct {
	mu      sync.Mutex
	wake    sync.Cond
	jobs    []*job
	cancel  context.CancelCauseFunc // of the cell that runs; nil when none does
	between bool                    // an interrupt dropped cells when none ran
	closed  bool
	arrived time.Time // when the latest cell came
}

// job is a cell: a request to execute, understood.
type job struct {
	*request
	wire.ExecuteRequest
	dropped *Failure // why it is answered without running
}

// maxJobs is how many cells may wait.
const maxJobs = 10_000

var errInterrupt = errors.New("interrupted")

func newQueue() *queue {
	q := &queue{}
	q.wake.L = &q.mu
	return q
}

// put adds a cell at the end; false means that too many wait already.
func (q *queue) put(j *job) bool {
	q.mu.Lock()
	defer q.mu.Unlock()
	if len(q.jobs) >= maxJobs {
		return false
	}
	if q.closed {
		j.dropped = shutDown
	}
	q.jobs = append(q.jobs, j)
	q.arrived = time.Now()
	q.wake.Signal()
	return true
}

// next waits for a cell; from then on it is the one that runs, until ctx is
// released by done. After close, next drains the queue and then returns nil.
func (q *queue) next() (j *job, ctx context.Context, done func()) {
	q.mu.Lock()
	defer q.mu.Unlock()
	for len(q.jobs) == 0 {
		if q.closed {
			return nil, nil, nil
		}
		q.wake.Wait()
	}
	j = q.jobs[0]
	q.jobs[0] = nil
	q.jobs = q.jobs[1:]
	ctx, cancel := context.WithCancelCause(context.Background())
	q.cancel = cancel
	return j, ctx, func() {
		q.mu.Lock()
		defer q.mu.Unlock()
		cancel(nil)
		q.cancel = nil
	}
}

// interrupt stops the cell that runs and drops those that wait.
func (q *queue) interrupt() {
	q.mu.Lock()
	defer q.mu.Unlock()
	if q.cancel != nil {
		q.cancel(errInterrupt)
	} else {
		q.between = len(q.jobs) > 0
	}
	q.dropAll(&Failure{Name: "Cancelled", Reason: "not run: an earlier cell was interrupted"})
}

// interruptedBetween says, once, that an interrupt came when no cell ran and
// some waited. The first of them then stands for the one that failed.
func (q *queue) interruptedBetween() bool {
	q.mu.Lock()
	defer q.mu.Unlock()
	between := q.between
	q.between = false
	return between
}

// latest is when the latest cell came.
func (q *queue) latest() time.Time {
	q.mu.Lock()
	defer q.mu.Unlock()
	return q.arrived
}

// drop drops the cells that wait.
func (q *queue) drop(why *Failure) {
	q.mu.Lock()
	defer q.mu.Unlock()
	q.dropAll(why)
}

func (q *queue) dropAll(why *Failure) {
	for _, j := range q.jobs {
		if j.dropped == nil {
			j.dropped = why
		}
	}
}

var shutDown = &Failure{Name: "Cancelled", Reason: "not run: the kernel is shutting down"}

// close stops and drops everything.
func (q *queue) close() {
	q.mu.Lock()
	defer q.mu.Unlock()
	q.closed = true
	if q.cancel != nil {
		q.cancel(errInterrupt)
	}
	q.dropAll(shutDown)
	q.wake.Broadcast()
}
