package kernel

import (
	"context"
	"encoding/json"
	"slices"
	"time"

	"adjoin/kernel/wire"
)

// Cells that a client has sent in one go arrive one after another. Those that
// are on their way when an early one fails must still be dropped, and no user
// asks for a cell so soon after seeing the failure: so the reply to a failed
// cell waits until none has arrived for a while, or for very long.
const (
	defaultQuiet = 20 * time.Millisecond
	maxQuiet     = 25 // times as long
)

// runCells runs the cells of the queue one after another until it is closed.
func (s *Server) runCells() {
	defer close(s.cellsDone)
	for {
		j, ctx, done := s.queue.next()
		if j == nil {
			return
		}
		s.desk.attend(j.request, true, func(*request) { s.runCell(ctx, done, j) })
		done() // again, for a defect may have cut runCell short
		s.history.Flush()
	}
}

// runCell is the life of a cell from busy to idle.
func (s *Server) runCell(ctx context.Context, done func(), j *job) {
	if j.dropped != nil {
		if s.queue.interruptedBetween() {
			s.dropBehind(j.dropped)
		}
		j.refuse(s.count, j.dropped)
		return
	}
	if j.Stored() {
		s.count++
	}
	emit := func(kind string, content any) { s.publish(j.Message, kind, content) }
	if !j.Silent {
		emit("execute_input", wire.ExecuteInput{Code: j.Code, ExecutionCount: s.count})
	}
	out := &output{ctx: ctx, count: s.count, silent: j.Silent, emit: emit, wait: s.iopub.Wait}
	failure := s.execute(ctx, j.Code, out)
	out.close()
	if j.Stored() {
		s.history.Add(s.count, j.Code, out.result)
	}
	if failure != nil {
		if !j.Silent {
			emit("error", failure.triple())
		}
		if j.Stops() {
			s.dropBehind(&Failure{Name: "Cancelled", Reason: "not run: an earlier cell failed"})
		}
		done()
		j.refuse(s.count, failure)
		return
	}
	expressions := s.evaluate(ctx, j.UserExpressions)
	done() // an interrupt that comes from here on concerns what comes after
	pages := out.pages
	if pages == nil {
		pages = []wire.Page{}
	}
	j.reply(wire.ExecuteReply{Status: wire.StatusOK, ExecutionCount: s.count, Payload: pages, UserExpressions: expressions})
}

// dropBehind drops the cells behind one that has failed, those on their way
// included.
func (s *Server) dropBehind(why *Failure) {
	begun := time.Now()
	for latest := begun; time.Since(latest) < s.quiet && time.Since(begun) < maxQuiet*s.quiet; {
		time.Sleep(s.quiet - time.Since(latest))
		if t := s.queue.latest(); t.After(latest) {
			latest = t
		}
	}
	s.queue.drop(why)
}

// refuse is the reply to a cell that failed or was not run.
func (j *job) refuse(count int, why *Failure) {
	j.reply(wire.ExecuteErrorReply{Status: wire.StatusError, ExecutionCount: count, Error: why.triple()})
}

// execute runs code; a panic of the engine is a failure like others.
func (s *Server) execute(ctx context.Context, code string, out *output) (failure *Failure) {
	defer func() {
		if p := recover(); p != nil {
			s.logf("a defect while running a cell: %v", p)
			failure = defect(p)
		}
	}()
	return s.engine.Execute(ctx, code, out)
}

// evaluate is the outcome of a request's user expressions.
func (s *Server) evaluate(ctx context.Context, expressions map[string]string) map[string]wire.Expression {
	outcome := map[string]wire.Expression{}
	names := make([]string, 0, len(expressions))
	for name := range expressions {
		names = append(names, name)
	}
	slices.Sort(names)
	for _, name := range names {
		b, failure := s.engine.Evaluate(ctx, expressions[name])
		if failure != nil {
			triple := failure.triple()
			outcome[name] = wire.Expression{Status: wire.StatusError, Error: &triple}
			continue
		}
		outcome[name] = wire.Expression{Status: wire.StatusOK, Data: filled(b.Data), Metadata: filled(b.Metadata)}
	}
	return outcome
}

// enqueue puts a request to execute into the queue.
func (s *Server) enqueue(r *request) {
	j := &job{request: r}
	if err := json.Unmarshal(r.Content, &j.ExecuteRequest); err != nil {
		j.dropped = malformed(err)
	}
	if !s.queue.put(j) {
		s.desk.attend(r, false, func(*request) {
			j.refuse(0, &Failure{Name: "Cancelled", Reason: "not run: too many cells wait already"})
		})
	}
}

func malformed(err error) *Failure {
	return &Failure{Name: "Malformed", Reason: "the request is malformed: " + err.Error()}
}
