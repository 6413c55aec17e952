package algebra

// Work is the workspace of one computation: an arena of words that inner loops
// reuse, and the Stop that long loops poll. A Work belongs to one goroutine;
// Fork makes one for another goroutine of the same computation.
//
// Scratch discipline:
//
//	m := w.Mark()
//	t := w.Words(n) // zeroed
//	...
//	w.Release(m)    // everything taken since the mark is free again
//
// A nil *Work is not valid; use NewWork(nil) for a computation that nothing
// stops.
type Work struct {
	stop   *Stop
	chunks [][]uint64
	chunk  int // index of the chunk in use
	used   int // words used in it
}

// Mark is a position in a workspace's arena.
type Mark struct{ chunk, used int }

const firstChunk = 1 << 10 // words; later chunks double

// NewWork returns an empty workspace that obeys stop, which may be nil.
func NewWork(stop *Stop) *Work { return &Work{stop: stop} }

// Fork returns an empty workspace for another goroutine of the same
// computation.
func (w *Work) Fork() *Work { return &Work{stop: w.stop} }

// Stop is the brake this workspace obeys; it may be nil.
func (w *Work) Stop() *Stop { return w.stop }

// Poll unwinds to the nearest Catch when the computation has been stopped. It
// costs one atomic load, so that any loop whose body takes longer than about a
// microsecond may call it.
func (w *Work) Poll() {
	if c := w.stop.Cause(); c != nil {
		panic(unwound{c})
	}
}

// Mark remembers how much of the arena is in use.
func (w *Work) Mark() Mark { return Mark{w.chunk, w.used} }

// Release frees everything taken since the mark.
func (w *Work) Release(m Mark) { w.chunk, w.used = m.chunk, m.used }

// Words returns n zeroed words that stay valid until the mark before them is
// released.
func (w *Work) Words(n int) []uint64 {
	t := w.Dirty(n)
	clear(t)
	return t
}

// Dirty is Words for callers that overwrite every word before reading it.
func (w *Work) Dirty(n int) []uint64 {
	for {
		if w.chunk == len(w.chunks) {
			size := firstChunk << len(w.chunks)
			if size < n {
				size = n
			}
			w.chunks = append(w.chunks, make([]uint64, size))
		}
		if c := w.chunks[w.chunk]; len(c)-w.used >= n {
			t := c[w.used : w.used+n : w.used+n]
			w.used += n
			return t
		}
		w.chunk, w.used = w.chunk+1, 0
	}
}
