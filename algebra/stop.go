package algebra

import "sync/atomic"

// Stop is the brake of one computation. Any goroutine may pull it, once; the
// loops of the computation notice through Work.Poll. The zero value is ready
// for use.
type Stop struct{ cause atomic.Pointer[Error] }

// Pull asks the computation to end with the given cause. Only the first pull
// counts.
func (s *Stop) Pull(cause *Error) { s.cause.CompareAndSwap(nil, cause) }

// Cause is nil while the computation may go on.
func (s *Stop) Cause() *Error {
	if s == nil {
		return nil
	}
	return s.cause.Load()
}

// unwound carries the cause up the stack to Catch.
type unwound struct{ cause *Error }

// Fail unwinds the computation to the nearest Catch with the given error.
// Kernels that have no error result use it for what a caller could not have
// known before, such as a zero divisor met deep inside a tower.
func Fail(e *Error) { panic(unwound{e}) }

// Catch turns an unwinding by Poll or Fail into an ordinary error. Defer it in
// the function that owns the computation:
//
//	func F(w *algebra.Work) (err error) {
//		defer algebra.Catch(&err)
//		...
//	}
//
// Other panics pass through.
func Catch(err *error) {
	switch r := recover().(type) {
	case nil:
	case unwound:
		*err = r.cause
	default:
		panic(r)
	}
}
