package wire

import (
	"bytes"
	"encoding/json"
	"errors"
	"testing"
)

func codec(t testing.TB, key string) *Codec {
	t.Helper()
	c, err := NewCodec("hmac-sha256", []byte(key))
	if err != nil {
		t.Fatal(err)
	}
	return c
}

func request() *Message {
	return &Message{
		Identities: [][]byte{[]byte("peer")},
		Header:     Header{ID: "1", Session: "s", Username: "u", Date: "2020-01-01T00:00:00Z", Type: "execute_request", Version: Protocol},
		Content:    json.RawMessage(`{"code":"1+1"}`),
		Buffers:    [][]byte{{1, 2, 3}},
	}
}

// Source: RFC 4231, Nystrom, "Identifiers and Test Vectors for HMAC-SHA-224,
// HMAC-SHA-256, HMAC-SHA-384, and HMAC-SHA-512", 2005, section 4.3, test case 2.
func TestSignPublishedVector(t *testing.T) {
	got := codec(t, "Jefe").Sign([]byte("what do ya "), []byte("want "), []byte("for nothing?"))
	if want := "5bdcc146bf60754e6a042426089575c75a003f089d2739839dec58b964ec3843"; string(got) != want {
		t.Errorf("%s", got)
	}
	long, err := NewCodec("hmac-sha512", []byte("Jefe"))
	if err != nil {
		t.Fatal(err)
	}
	want := "164b7a7bfcf819e2e395fbe73b56e0a387bd64222e831fd610270cd7ea250554" +
		"9758bf75c05a994a6d034f65f8f0e6fdcaeab1a34d4a6b4b636e070a38bce737"
	if got := long.Sign([]byte("what do ya want for nothing?")); string(got) != want {
		t.Errorf("%s", got)
	}
}

func TestRoundTrip(t *testing.T) {
	for _, key := range []string{"", "secret"} {
		frames, err := codec(t, key).Encode(request())
		if err != nil {
			t.Fatal(err)
		}
		m, err := codec(t, key).Decode(frames)
		if err != nil {
			t.Fatal(err)
		}
		want := request()
		if m.Header != want.Header || string(m.Content) != string(want.Content) || string(m.Parent) != "{}" ||
			string(m.Identities[0]) != "peer" || !bytes.Equal(m.Buffers[0], want.Buffers[0]) {
			t.Errorf("key %q: came back as %+v", key, m)
		}
	}
}

func TestDecodeRefuses(t *testing.T) {
	good, _ := codec(t, "secret").Encode(request())
	with := func(i int, b string) [][]byte {
		f := append([][]byte(nil), good...)
		f[i] = []byte(b)
		return f
	}
	signed := func(parts ...string) [][]byte {
		f := [][]byte{delimiter, nil}
		var p [][]byte
		for _, s := range parts {
			p = append(p, []byte(s))
		}
		f[1] = codec(t, "secret").Sign(p...)
		return append(f, p...)
	}
	other, _ := codec(t, "other").Encode(request())
	for name, c := range map[string]struct {
		frames [][]byte
		want   error
	}{
		"nothing":           {nil, ErrFrames},
		"no delimiter":      {good[2:], ErrFrames},
		"truncated":         {good[:6], ErrFrames},
		"delimiter alone":   {[][]byte{delimiter}, ErrFrames},
		"endless route":     {append(make([][]byte, 100), good...), ErrFrames},
		"empty signature":   {with(2, ""), ErrSignature},
		"short signature":   {with(2, string(good[2][:10])), ErrSignature},
		"changed content":   {with(6, `{"code":"2+2"}`), ErrSignature},
		"other key":         {other, ErrSignature},
		"header not JSON":   {signed("x", "{}", "{}", "{}"), ErrJSON},
		"content not JSON":  {signed(`{"msg_id":"1"}`, "{}", "{}", "{"), ErrJSON},
		"content a list":    {signed(`{"msg_id":"1"}`, "{}", "{}", "[]"), ErrJSON},
		"content NaN":       {signed(`{"msg_id":"1"}`, "{}", "{}", `{"x":NaN}`), ErrJSON},
		"two objects":       {signed(`{"msg_id":"1"}`, "{}", "{}", `{}{}`), ErrJSON},
		"header of numbers": {signed(`{"msg_id":1}`, "{}", "{}", `{}`), ErrJSON},
	} {
		if _, err := codec(t, "secret").Decode(c.frames); !errors.Is(err, c.want) {
			t.Errorf("%s: %v", name, err)
		}
	}
}

func TestDecodeRefusesReplay(t *testing.T) {
	c := codec(t, "secret")
	frames, _ := c.Encode(request())
	if _, err := c.Decode(frames); err != nil {
		t.Fatal(err)
	}
	if _, err := c.Decode(frames); !errors.Is(err, ErrReplayed) {
		t.Errorf("%v", err)
	}
}

func TestReplaysAreBounded(t *testing.T) {
	var r replays
	sign := func(i int) []byte { return []byte{byte(i), byte(i >> 8), byte(i >> 16)} }
	for i := range 3*remembered + 5 {
		if !r.add(sign(i)) {
			t.Fatalf("signature %d is new", i)
		}
	}
	if len(r.known) != remembered || len(r.ring) != remembered {
		t.Errorf("%d and %d kept", len(r.known), len(r.ring))
	}
	if last := 3*remembered + 4; r.add(sign(last)) || r.add(sign(last-remembered+1)) || !r.add(sign(last-remembered)) {
		t.Error("the latest are not the ones kept")
	}
}

func TestUnknownFieldsSurviveAsParent(t *testing.T) {
	c := codec(t, "")
	header := `{"msg_id":"1","msg_type":"x_request","extra":{"b":1, "a":[2]}}`
	m, err := c.Decode([][]byte{delimiter, {}, []byte(header), []byte("{}"), []byte("{}"), []byte("{}")})
	if err != nil {
		t.Fatal(err)
	}
	frames, err := c.Encode(&Message{Header: Header{Type: m.ReplyType()}, Parent: m.Origin})
	if err != nil {
		t.Fatal(err)
	}
	if string(frames[3]) != header {
		t.Errorf("parent is %s", frames[3])
	}
	if m.ReplyType() != "x_reply" || !m.IsRequest() {
		t.Errorf("reply type %s", m.ReplyType())
	}
}

func TestCursor(t *testing.T) {
	// 𝔽 and 😀 lie outside the basic plane: four bytes, one code point, two
	// units of UTF-16.
	s := "𝔽_8 + α😀x"
	runes := []rune(s)
	for n := 0; n <= len(runes); n++ {
		i := ByteOffset(s, n)
		if s[:i] != string(runes[:n]) {
			t.Errorf("code point %d is byte %d", n, i)
		}
		if CodePoint(s, i) != n {
			t.Errorf("byte %d is code point %d, want %d", i, CodePoint(s, i), n)
		}
	}
	if ByteOffset(s, -1) != 0 || ByteOffset(s, 100) != len(s) || CodePoint(s, -1) != 0 || CodePoint(s, 1000) != len(runes) {
		t.Error("places outside are not moved to the ends")
	}
}

func TestDefaultsOfExecute(t *testing.T) {
	for text, want := range map[string][2]bool{
		`{}`:                                   {true, true},
		`{"silent":true}`:                      {false, true},
		`{"store_history":false}`:              {false, true},
		`{"silent":true,"store_history":true}`: {false, true},
		`{"stop_on_error":false}`:              {true, false},
	} {
		var r ExecuteRequest
		if err := json.Unmarshal([]byte(text), &r); err != nil {
			t.Fatal(err)
		}
		if got := [2]bool{r.Stored(), r.Stops()}; got != want {
			t.Errorf("%s: %v", text, got)
		}
	}
}

func TestMarshalKeepsText(t *testing.T) {
	b, err := Marshal(map[string]any{"b": "<a & b>", "a": []byte{1}})
	if err != nil || string(b) != `{"a":"AQ==","b":"<a & b>"}` {
		t.Errorf("%s %v", b, err)
	}
}

func FuzzDecode(f *testing.F) {
	good, _ := codec(f, "").Encode(request())
	f.Add(bytes.Join(good, []byte{0}))
	f.Add([]byte("<IDS|MSG>\x00\x00{}\x00{}\x00{}\x00{}"))
	f.Fuzz(func(t *testing.T, in []byte) {
		c := codec(t, "")
		m, err := c.Decode(bytes.Split(in, []byte{0}))
		if err != nil {
			return
		}
		m.ParentHeader()
		for _, v := range []any{new(ExecuteRequest), new(CompleteRequest), new(InspectRequest), new(HistoryRequest), new(Comm), new(Shutdown)} {
			_ = json.Unmarshal(m.Content, v)
		}
		if _, err := c.Encode(m); err != nil {
			t.Error(err)
		}
	})
}
