package wire

import "encoding/json"

// Status of a reply.
const (
	StatusOK    = "ok"
	StatusError = "error"
)

// States of a kernel, as a status message tells them.
const (
	Starting = "starting"
	Busy     = "busy"
	Idle     = "idle"
)

// LanguageInfo tells a client about the language of the cells.
type LanguageInfo struct {
	Name           string `json:"name"`
	Version        string `json:"version"`
	MIMEType       string `json:"mimetype"`
	FileExtension  string `json:"file_extension"` // with its dot
	PygmentsLexer  string `json:"pygments_lexer,omitempty"`
	CodeMirrorMode string `json:"codemirror_mode,omitempty"`
}

// HelpLink is an entry of a client's help menu.
type HelpLink struct {
	Text string `json:"text"`
	URL  string `json:"url"`
}

// KernelInfoReply answers kernel_info_request.
type KernelInfoReply struct {
	Status                string       `json:"status"`
	ProtocolVersion       string       `json:"protocol_version"`
	Implementation        string       `json:"implementation"`
	ImplementationVersion string       `json:"implementation_version"`
	LanguageInfo          LanguageInfo `json:"language_info"`
	Banner                string       `json:"banner"`
	HelpLinks             []HelpLink   `json:"help_links"`
	SupportedFeatures     []string     `json:"supported_features"`
}

// ExecuteRequest asks to run a cell. StoreHistory and StopOnError are pointers
// because their absence does not mean false: use the methods.
type ExecuteRequest struct {
	Code            string            `json:"code"`
	Silent          bool              `json:"silent"`
	StoreHistory    *bool             `json:"store_history,omitempty"`
	UserExpressions map[string]string `json:"user_expressions,omitempty"`
	AllowStdin      bool              `json:"allow_stdin"`
	StopOnError     *bool             `json:"stop_on_error,omitempty"`
}

// Stored says whether the cell counts and is kept in the history.
func (r ExecuteRequest) Stored() bool {
	return !r.Silent && (r.StoreHistory == nil || *r.StoreHistory)
}

// Stops says whether a failure drops the requests that wait behind this one.
func (r ExecuteRequest) Stops() bool { return r.StopOnError == nil || *r.StopOnError }

// Error is the triple that says why something failed.
type Error struct {
	Name      string   `json:"ename"`
	Value     string   `json:"evalue"`
	Traceback []string `json:"traceback"`
}

// ErrorReply answers a request that failed.
type ErrorReply struct {
	Status string `json:"status"`
	Error
}

// ExecuteReply answers a cell that ran.
type ExecuteReply struct {
	Status          string                `json:"status"`
	ExecutionCount  int                   `json:"execution_count"`
	Payload         []Page                `json:"payload"`
	UserExpressions map[string]Expression `json:"user_expressions"`
}

// ExecuteErrorReply answers a cell that failed or was not run.
type ExecuteErrorReply struct {
	Status         string `json:"status"`
	ExecutionCount int    `json:"execution_count"`
	Error
}

// Page is a payload that asks the client to show data in its pager.
type Page struct {
	Source string         `json:"source"` // page
	Data   map[string]any `json:"data"`
	Start  int            `json:"start"`
}

// Expression is the outcome of one of an execute request's user expressions.
type Expression struct {
	Status   string         `json:"status"`
	Data     map[string]any `json:"data,omitempty"`
	Metadata map[string]any `json:"metadata,omitempty"`
	*Error
}

// ExecuteInput broadcasts what is about to run.
type ExecuteInput struct {
	Code           string `json:"code"`
	ExecutionCount int    `json:"execution_count"`
}

// DisplayData is something to show; with a count it is an execute_result.
type DisplayData struct {
	Data           map[string]any `json:"data"`
	Metadata       map[string]any `json:"metadata"`
	Transient      map[string]any `json:"transient,omitempty"`
	ExecutionCount int            `json:"execution_count,omitempty"`
}

// Stream is text of stdout or stderr.
type Stream struct {
	Name string `json:"name"`
	Text string `json:"text"`
}

// ClearOutput wipes what the cell has shown, with Wait when the next thing is
// shown.
type ClearOutput struct {
	Wait bool `json:"wait"`
}

// KernelStatus broadcasts what the kernel does.
type KernelStatus struct {
	State string `json:"execution_state"`
}

// Welcome is the first message of a new subscription.
type Welcome struct {
	Subscription string `json:"subscription"`
}

// CompleteRequest asks what could stand at the cursor.
type CompleteRequest struct {
	Code   string `json:"code"`
	Cursor int    `json:"cursor_pos"` // in code points
}

// CompleteReply answers it. Places are in code points.
type CompleteReply struct {
	Status   string             `json:"status"`
	Matches  []string           `json:"matches"`
	Start    int                `json:"cursor_start"`
	End      int                `json:"cursor_end"`
	Metadata CompletionMetadata `json:"metadata"`
}

// CompletionMetadata holds the kinds of the matches, for clients that draw
// them.
type CompletionMetadata struct {
	Types []CompletionType `json:"_jupyter_types_experimental"`
}

// CompletionType describes one match.
type CompletionType struct {
	Start     int    `json:"start"`
	End       int    `json:"end"`
	Text      string `json:"text"`
	Type      string `json:"type"`
	Signature string `json:"signature"`
}

// InspectRequest asks about the word at the cursor.
type InspectRequest struct {
	Code   string `json:"code"`
	Cursor int    `json:"cursor_pos"` // in code points
	Detail int    `json:"detail_level"`
}

// InspectReply answers it.
type InspectReply struct {
	Status   string         `json:"status"`
	Found    bool           `json:"found"`
	Data     map[string]any `json:"data"`
	Metadata map[string]any `json:"metadata"`
}

// IsCompleteRequest asks whether a text is ready to run.
type IsCompleteRequest struct {
	Code string `json:"code"`
}

// IsCompleteReply answers it with complete, incomplete or invalid; Indent only
// when incomplete.
type IsCompleteReply struct {
	Status string  `json:"status"`
	Indent *string `json:"indent,omitempty"`
}

// HistoryRequest asks for earlier inputs.
type HistoryRequest struct {
	Output  bool   `json:"output"`
	Raw     bool   `json:"raw"`
	Access  string `json:"hist_access_type"` // range, tail or search
	Session int    `json:"session"`
	Start   int    `json:"start"`
	Stop    *int   `json:"stop"`
	N       *int   `json:"n"`
	Pattern string `json:"pattern"`
	Unique  bool   `json:"unique"`
}

// HistoryReply answers it: each entry is [session, line, input], or [session,
// line, [input, output]] when outputs were asked for.
type HistoryReply struct {
	Status  string   `json:"status"`
	History [][3]any `json:"history"`
}

// CommInfoReply lists the open comms.
type CommInfoReply struct {
	Status string         `json:"status"`
	Comms  map[string]any `json:"comms"`
}

// Comm is what comm_open, comm_msg and comm_close have in common.
type Comm struct {
	ID   string          `json:"comm_id"`
	Data json.RawMessage `json:"data"`
}

// Shutdown is a shutdown_request, and with a status its reply.
type Shutdown struct {
	Status  string `json:"status,omitempty"`
	Restart bool   `json:"restart"`
}

// Reply answers a request that has nothing more to say than its status.
type Reply struct {
	Status string `json:"status"`
}
