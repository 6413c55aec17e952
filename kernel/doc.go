// Package kernel is a Jupyter kernel without a language: it receives requests,
// hands cells to an Engine, and sends what they show. It knows no notation and
// no mathematics; Engine is the only door to them, and kernel/engine is the
// Engine that stands behind it in the program.
//
// The goroutines: one for each connection reads requests (package transport).
// Cells go into a queue and run one after another on a goroutine of their own;
// everything else, on shell and control alike, is answered at once, also while
// a cell runs. Heartbeats are answered by the transport's goroutines alone.
//
// Where to start reading: engine.go for what a language must do; server.go for
// the life of a kernel; desk.go, the one place that keeps the order of messages;
// cell.go for the life of a cell; queue.go for what waits and what is dropped.
package kernel
