package result

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
	"slices"

	"linewitness/sim/record"
)

// The limits on a document: far beyond what the largest design gives.
const (
	MaxBytes = 64 << 20
	maxDepth = 32
	maxNodes = 2 << 20
)

// Read reads a document.
//
// It fails for what is not JSON, is over the limits, has a key twice, or is not
// a result of a known format.
func Read(text []byte) (*Node, error) {
	if len(text) > MaxBytes {
		return nil, fmt.Errorf("the result has more than %d MiB", MaxBytes>>20)
	}
	r := &reader{text: text, d: json.NewDecoder(bytes.NewReader(text))}
	r.d.UseNumber()
	root, err := r.value(0)
	if err == nil {
		if _, more := r.d.Token(); !errors.Is(more, io.EOF) {
			err = errors.New("more follows after the end of the document")
		}
	}
	if err != nil {
		return nil, fmt.Errorf("line %d: %w", r.line(), unexpected(err))
	}
	return root, check(root)
}

// Recognised reports whether a text looks like a result, and not like a design
// file, which may be JSON as well.
func Recognised(text []byte) bool {
	var head struct {
		Tool  *json.RawMessage `json:"tool"`
		Cases *json.RawMessage `json:"cases"`
	}
	return len(text) <= MaxBytes && json.Unmarshal(text, &head) == nil && head.Tool != nil && head.Cases != nil
}

// check refuses what is JSON and no result.
func check(root *Node) error {
	format := root.Float("format")
	switch {
	case root.Kind != Object || root.Get("format") == nil:
		return errors.New(`it is not a result of linewitness: it has no "format"`)
	case format != record.Format:
		return fmt.Errorf("its format is %s, and this program knows format %d", root.Get("format").Text, record.Format)
	}
	for _, key := range []string{"tool", "design", "cases"} {
		if n := root.Get(key); n == nil || n.Kind != Object {
			return fmt.Errorf("it is not a result of linewitness: it has no %q", key)
		}
	}
	for i, c := range root.Get("cases").Nodes {
		if c.Kind != Object {
			return fmt.Errorf("it is not a result of linewitness: case %q is no object", root.Get("cases").Keys[i])
		}
	}
	return nil
}

// unexpected says what the end of a text in the middle of a value means.
func unexpected(err error) error {
	if errors.Is(err, io.EOF) || errors.Is(err, io.ErrUnexpectedEOF) {
		return errors.New("the document ends in the middle of a value")
	}
	return err
}

// A reader turns tokens into nodes.
type reader struct {
	text  []byte
	d     *json.Decoder
	nodes int
}

// line is where the reader stands, counted from 1.
func (r *reader) line() int {
	at := min(int(r.d.InputOffset()), len(r.text))
	return bytes.Count(r.text[:at], []byte("\n")) + 1
}

func (r *reader) value(depth int) (*Node, error) {
	t, err := r.d.Token()
	if err != nil {
		return nil, err
	}
	return r.of(t, depth)
}

// of is the value that begins with a token.
func (r *reader) of(t json.Token, depth int) (*Node, error) {
	if r.nodes++; r.nodes > maxNodes {
		return nil, fmt.Errorf("the document has more than %d values", maxNodes)
	}
	switch t := t.(type) {
	case json.Delim:
		if depth == maxDepth {
			return nil, fmt.Errorf("nested more than %d levels deep", maxDepth)
		}
		if t == '{' {
			return r.object(depth + 1)
		}
		return r.list(depth + 1)
	case string:
		return &Node{Kind: Text, Text: t}, nil
	case bool:
		return &Node{Kind: Bool, Text: fmt.Sprint(t)}, nil
	case json.Number:
		v, err := t.Float64()
		if err != nil || math.IsInf(v, 0) {
			return nil, fmt.Errorf("the number %.40s is too large", t)
		}
		return &Node{Kind: Number, Text: t.String(), Value: v}, nil
	}
	return &Node{Text: "null"}, nil
}

func (r *reader) object(depth int) (*Node, error) {
	n := &Node{Kind: Object}
	seen := map[string]bool{}
	for r.d.More() {
		t, err := r.d.Token()
		if err != nil {
			return nil, err
		}
		key, ok := t.(string)
		if !ok {
			return nil, errors.New("a key is not a text")
		}
		if seen[key] {
			return nil, fmt.Errorf("the key %q is there twice", key)
		}
		seen[key] = true
		v, err := r.value(depth)
		if err != nil {
			return nil, err
		}
		n.Keys, n.Nodes = append(n.Keys, key), append(n.Nodes, v)
	}
	_, err := r.d.Token()
	n.Keys, n.Nodes = slices.Clip(n.Keys), slices.Clip(n.Nodes)
	return n, err
}

func (r *reader) list(depth int) (*Node, error) {
	n := &Node{Kind: List}
	for r.d.More() {
		v, err := r.value(depth)
		if err != nil {
			return nil, err
		}
		n.Nodes = append(n.Nodes, v)
	}
	_, err := r.d.Token()
	return n, err
}
