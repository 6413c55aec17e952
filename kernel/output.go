package kernel

import (
	"context"
	"strings"
	"sync"
	"time"

	"adjoin/kernel/wire"
)

// window is how long text of a stream is collected before it is sent: servers
// drop what comes in too many messages.
const window = 50 * time.Millisecond

// output sends what one cell shows. Text is sent at once when the last sending
// is long ago, and collected otherwise; everything else is preceded by the text
// collected so far, so that the order is kept.
type output struct {
	ctx    context.Context
	count  int
	silent bool
	emit   func(kind string, content any)
	wait   func(context.Context) // holds up a flood

	mu     sync.Mutex
	closed bool
	name   string // of the stream that text belongs to
	text   strings.Builder
	sent   time.Time
	timer  *time.Timer
	pages  []wire.Page
	result string // text/plain of the result, for the history
}

func (o *output) Stdout(text string) { o.stream("stdout", text) }
func (o *output) Stderr(text string) { o.stream("stderr", text) }

// largest text of one stream message.
const maxText = 1 << 18

func (o *output) stream(name, text string) {
	if text == "" || o.silent {
		return
	}
	o.wait(o.ctx)
	o.mu.Lock()
	defer o.mu.Unlock()
	if o.closed {
		return
	}
	if name != o.name {
		o.flush()
		o.name = name
	}
	o.text.WriteString(text)
	due := window - time.Since(o.sent)
	switch {
	case due <= 0 || o.text.Len() >= maxText:
		o.flush()
	case o.timer == nil:
		o.timer = time.AfterFunc(due, func() {
			o.mu.Lock()
			defer o.mu.Unlock()
			o.flush()
		})
	}
}

// flush sends the text collected; o.mu is held.
func (o *output) flush() {
	if o.timer != nil {
		o.timer.Stop()
		o.timer = nil
	}
	if o.text.Len() == 0 {
		return
	}
	o.emit("stream", wire.Stream{Name: o.name, Text: o.text.String()})
	o.text.Reset()
	o.sent = time.Now()
}

// show sends a message after the text that came before it.
func (o *output) show(kind string, content any) {
	if o.silent {
		return
	}
	o.wait(o.ctx)
	o.mu.Lock()
	defer o.mu.Unlock()
	if o.closed {
		return
	}
	o.flush()
	o.emit(kind, content)
}

func (o *output) Display(b Bundle) {
	o.show("display_data", wire.DisplayData{Data: filled(b.Data), Metadata: filled(b.Metadata), Transient: map[string]any{}})
}

func (o *output) Result(b Bundle) {
	if text, ok := b.Data["text/plain"].(string); ok {
		o.mu.Lock()
		o.result = text
		o.mu.Unlock()
	}
	o.show("execute_result", wire.DisplayData{Data: filled(b.Data), Metadata: filled(b.Metadata), ExecutionCount: o.count})
}

// Page becomes part of the reply, not of the output.
func (o *output) Page(b Bundle) {
	o.mu.Lock()
	defer o.mu.Unlock()
	o.pages = append(o.pages, wire.Page{Source: "page", Data: filled(b.Data)})
}

func (o *output) Clear(wait bool) { o.show("clear_output", wire.ClearOutput{Wait: wait}) }

// close sends the rest; what comes later is dropped.
func (o *output) close() {
	o.mu.Lock()
	defer o.mu.Unlock()
	o.flush()
	o.closed = true
}

// filled is m, or an empty map: the protocol wants an object.
func filled(m map[string]any) map[string]any {
	if m == nil {
		return map[string]any{}
	}
	return m
}
