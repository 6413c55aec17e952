package kernel

import (
	"fmt"
	"runtime/debug"
	"sync"

	"adjoin/kernel/wire"
)

// desk is the one place that keeps the order of messages:
//
//   - busy is the first broadcast about a request, idle the last, whatever
//     happens in between, and the reply comes before idle;
//   - while a cell runs, the idle of another request is followed by a busy of
//     the cell, since clients take the latest status for the kernel's.
type desk struct {
	publish func(parent *wire.Message, kind string, content any)
	logf    func(format string, args ...any)

	mu      sync.Mutex
	running *wire.Message // the request whose cell runs
}

// request is one message from a client, and the way back to it.
type request struct {
	*wire.Message
	send    func(kind string, content any)
	replied bool
	then    func() // to be done when all is said
}

// reply sends the reply to the request.
func (r *request) reply(content any) {
	r.send(r.ReplyType(), content)
	r.replied = true
}

// attend lets handle deal with a request; cell says that this is a cell that
// runs.
func (d *desk) attend(r *request, cell bool, handle func(*request)) {
	d.open(r, cell)
	defer d.close(r, cell)
	defer func() {
		if p := recover(); p != nil {
			d.logf("a defect while answering %s: %v\n%s", r.Header.Type, p, debug.Stack())
			if r.IsRequest() && !r.replied {
				r.reply(wire.ErrorReply{Status: wire.StatusError, Error: defect(p).triple()})
			}
		}
	}()
	handle(r)
}

func (d *desk) open(r *request, cell bool) {
	d.mu.Lock()
	defer d.mu.Unlock()
	if cell {
		d.running = r.Message
	}
	d.publish(r.Message, "status", wire.KernelStatus{State: wire.Busy})
}

func (d *desk) close(r *request, cell bool) {
	d.mu.Lock()
	defer d.mu.Unlock()
	if cell {
		d.running = nil
	}
	d.publish(r.Message, "status", wire.KernelStatus{State: wire.Idle})
	if d.running != nil {
		d.publish(d.running, "status", wire.KernelStatus{State: wire.Busy})
	}
}

// defect is the failure that stands for a panic.
func defect(p any) *Failure {
	reason := fmt.Sprintf("a defect in the kernel, not in the cell: %v; the session is intact, please report this line together with the cell", p)
	return &Failure{Name: "Defect", Reason: reason, Traceback: []string{reason}}
}

// triple is the failure as the protocol has it.
func (f *Failure) triple() wire.Error {
	lines := f.Traceback
	if lines == nil {
		lines = []string{}
	}
	return wire.Error{Name: f.Name, Value: f.Reason, Traceback: lines}
}
