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
// Protocol 5.5, and the start of 5.6. On shell and control: kernel_info,
// execute (shell), complete, inspect, is_complete, history, comm_info, interrupt,
// shutdown and usage requests; comm_open is answered by comm_close; subshells
// are refused; other types get busy and idle. Broadcasts: iopub_welcome, status,
// execute_input, stream, display_data, execute_result, clear_output, error,
// comm_close, shutdown_reply. Not there: debug requests, input requests (no cell
// asks its user), comms, and the encryption that some clients can ask for.
//
// Who may talk to a kernel: whoever can reach its ports, which are those of the
// loopback address unless the connection file says otherwise, and knows the key
// in that file, which only its owner can read. Messages are signed and not
// encrypted. What is unsigned, badly signed or a replay is dropped without an
// answer. A peer without the key can hold connections, of which there are at
// most 256 for a channel, and nothing else.
//
// Where to start reading: engine.go for what a language must do; server.go for
// the life of a kernel; desk.go, the one place that keeps the order of messages;
// cell.go for the life of a cell; queue.go for what waits and what is dropped.
package kernel
