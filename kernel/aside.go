package kernel

import (
	"encoding/json"

	"adjoin/kernel/wire"
)

// answers says, by type, how the requests are answered that need not wait for
// cells. On shell and control alike; a type that is not here gets busy and
// idle and no reply, as the protocol asks.
var answers = map[string]func(*Server, *request) error{
	"kernel_info_request":     (*Server).answerInfo,
	"complete_request":        (*Server).answerComplete,
	"inspect_request":         (*Server).answerInspect,
	"is_complete_request":     (*Server).answerIsComplete,
	"history_request":         (*Server).answerHistory,
	"comm_info_request":       (*Server).answerCommInfo,
	"comm_open":               (*Server).refuseComm,
	"interrupt_request":       (*Server).answerInterrupt,
	"shutdown_request":        (*Server).answerShutdown,
	"usage_request":           (*Server).answerUsage,
	"create_subshell_request": (*Server).refuseSubshell,
	"delete_subshell_request": (*Server).refuseSubshell,
	"list_subshell_request":   (*Server).refuseSubshell,
}

// answer answers a request at once.
func (s *Server) answer(r *request) {
	s.desk.attend(r, false, func(r *request) {
		handle := answers[r.Header.Type]
		if handle == nil {
			s.logf("a message of unknown type %q is ignored", r.Header.Type)
			return
		}
		if err := handle(s, r); err != nil && r.IsRequest() {
			r.reply(wire.ErrorReply{Status: wire.StatusError, Error: malformed(err).triple()})
		}
	})
}

func (s *Server) answerInfo(r *request) error {
	i := s.engine.Info()
	links := []wire.HelpLink{}
	for _, l := range i.Links {
		links = append(links, wire.HelpLink(l))
	}
	r.reply(wire.KernelInfoReply{
		Status:                wire.StatusOK,
		ProtocolVersion:       wire.Protocol,
		Implementation:        i.Implementation,
		ImplementationVersion: i.Version,
		LanguageInfo: wire.LanguageInfo{
			Name: i.Language, Version: i.LanguageLevel, MIMEType: i.MIMEType, FileExtension: i.FileExtension,
		},
		Banner:            i.Banner,
		HelpLinks:         links,
		SupportedFeatures: []string{},
	})
	return nil
}

func (s *Server) answerComplete(r *request) error {
	var q wire.CompleteRequest
	if err := json.Unmarshal(r.Content, &q); err != nil {
		return err
	}
	c := s.engine.Complete(q.Code, wire.ByteOffset(q.Code, q.Cursor))
	a := wire.CompleteReply{
		Status:   wire.StatusOK,
		Matches:  []string{},
		Start:    wire.CodePoint(q.Code, c.From),
		End:      wire.CodePoint(q.Code, c.To),
		Metadata: wire.CompletionMetadata{Types: []wire.CompletionType{}},
	}
	for _, i := range c.Items {
		a.Matches = append(a.Matches, i.Text)
		a.Metadata.Types = append(a.Metadata.Types, wire.CompletionType{
			Start: a.Start, End: a.End, Text: i.Text, Type: i.Kind, Signature: i.Signature,
		})
	}
	r.reply(a)
	return nil
}

func (s *Server) answerInspect(r *request) error {
	var q wire.InspectRequest
	if err := json.Unmarshal(r.Content, &q); err != nil {
		return err
	}
	b, found := s.engine.Inspect(q.Code, wire.ByteOffset(q.Code, q.Cursor), q.Detail)
	r.reply(wire.InspectReply{Status: wire.StatusOK, Found: found, Data: filled(b.Data), Metadata: filled(b.Metadata)})
	return nil
}

func (s *Server) answerIsComplete(r *request) error {
	var q wire.IsCompleteRequest
	if err := json.Unmarshal(r.Content, &q); err != nil {
		return err
	}
	c := s.engine.IsComplete(q.Code)
	a := wire.IsCompleteReply{Status: string(c.Status)}
	if c.Status == Incomplete {
		a.Indent = &c.Indent
	}
	r.reply(a)
	return nil
}

func (s *Server) answerHistory(r *request) error {
	var q wire.HistoryRequest
	if err := json.Unmarshal(r.Content, &q); err != nil {
		return err
	}
	r.reply(wire.HistoryReply{Status: wire.StatusOK, History: s.history.answer(q)})
	return nil
}

// There are no comms: a list of them is empty, and one that a client opens is
// closed again.

func (s *Server) answerCommInfo(r *request) error {
	r.reply(wire.CommInfoReply{Status: wire.StatusOK, Comms: map[string]any{}})
	return nil
}

func (s *Server) refuseComm(r *request) error {
	var c wire.Comm
	if err := json.Unmarshal(r.Content, &c); err != nil {
		return err
	}
	s.publish(r.Message, "comm_close", wire.Comm{ID: c.ID, Data: json.RawMessage("{}")})
	return nil
}

func (s *Server) answerInterrupt(r *request) error {
	s.queue.interrupt()
	r.reply(wire.Reply{Status: wire.StatusOK})
	return nil
}

func (s *Server) answerShutdown(r *request) error {
	var q wire.Shutdown
	if err := json.Unmarshal(r.Content, &q); err != nil {
		return err
	}
	a := wire.Shutdown{Status: wire.StatusOK, Restart: q.Restart}
	s.publish(r.Message, "shutdown_reply", a)
	r.reply(a)
	r.then = s.stop
	return nil
}

func (s *Server) answerUsage(r *request) error {
	r.reply(s.usage.measure())
	return nil
}

// refuseSubshell answers clients that do not look at the list of features.
func (s *Server) refuseSubshell(r *request) error {
	f := &Failure{Name: "Unsupported", Reason: "this kernel has no subshells"}
	r.reply(wire.ErrorReply{Status: wire.StatusError, Error: f.triple()})
	return nil
}
