package syntax

import (
	"bytes"
	"compress/zlib"
	"io"
	"strconv"
	"sync"
)

// stream reads the data of a stream (7.3.8) after its keyword.
func (f *File) stream(d Dict, l *lexer) (*Stream, error) {
	if !l.take("\r\n") && !l.take("\n") {
		return nil, damaged("no end of line after stream")
	}
	n, err := f.Int(d["Length"])
	if err != nil {
		return nil, damaged("length of a stream: %w", err)
	}
	if n < 0 || n > len(l.b)-l.i {
		return nil, damaged("a stream of %d bytes does not fit into the file", n)
	}
	data := l.b[l.i : l.i+n]
	l.i += n
	if !l.keyword("endstream") || !l.keyword("endobj") {
		return nil, damaged("a stream of %d bytes does not end there", n)
	}
	return &Stream{d, data}, nil
}

// Int returns v, resolved, as an integer.
func (f *File) Int(v Value) (int, error) {
	s, err := As[Number](f, v)
	if err != nil {
		return 0, err
	}
	n, err := strconv.Atoi(string(s))
	if err != nil {
		return 0, damaged("%q is not an integer", string(s))
	}
	return n, nil
}

// Decode returns the data of a stream without its filter (7.4).
func (f *File) Decode(s *Stream) ([]byte, error) {
	filters, err := f.oneOrMore(s.Dict["Filter"])
	if err != nil {
		return nil, err
	}
	switch {
	case len(filters) == 0:
		return f.spend(bytes.NewReader(s.Data))
	case len(filters) > 1 || filters[0] != Name("FlateDecode"):
		return nil, damaged("filter %v is not read", filters)
	}
	data, err := f.inflate(s.Data)
	if err != nil {
		return nil, err
	}
	return f.predicted(data, s.Dict["DecodeParms"])
}

func (f *File) inflate(data []byte) ([]byte, error) {
	if len(data) == 0 { // what other programs make of an empty file
		return nil, nil
	}
	z, err := zlib.NewReader(bytes.NewReader(data))
	if err != nil {
		return nil, damaged("compressed data: %w", err)
	}
	return f.spend(z)
}

// Repack compresses the data of a stream anew if that makes them shorter, and
// leaves a predictor as it is.
func (f *File) Repack(s *Stream) error {
	if s.Dict["Filter"] != Name("FlateDecode") {
		return nil
	}
	data, err := f.inflate(s.Data)
	if err != nil {
		return err
	}
	if z := deflate(data, zlib.DefaultCompression); len(z) < len(s.Data) {
		s.Data = z
	}
	return nil
}

// spend reads all of r, as long as the limit lasts.
func (f *File) spend(r io.Reader) ([]byte, error) {
	data, err := io.ReadAll(io.LimitReader(r, int64(f.inflated)+1))
	if len(data) > f.inflated {
		return nil, beyond("bytes in streams", f.limits.Inflated)
	}
	f.inflated -= len(data)
	if err != nil {
		return nil, damaged("compressed data: %w", err)
	}
	return data, nil
}

// oneOrMore resolves what may be missing, one value or an array of them.
func (f *File) oneOrMore(v Value) (Array, error) {
	v, err := f.Resolve(v)
	if err != nil {
		return nil, err
	}
	switch v := v.(type) {
	case nil, Null:
		return nil, nil
	case Array:
		out := make(Array, len(v))
		for i := range v {
			if out[i], err = f.Resolve(v[i]); err != nil {
				return nil, err
			}
		}
		return out, nil
	}
	return Array{v}, nil
}

// NewStream returns a stream of d and data, compressed.
func NewStream(d Dict, data []byte) *Stream {
	return newStream(d, deflate(data, zlib.DefaultCompression))
}

// fast is the level for long columns of digits: a third of the time of the usual
// level for 7 % more bytes (measured on waveforms).
const fast = 4

// NewLongStream is NewStream for what may be many MiB.
func NewLongStream(d Dict, data []byte) *Stream { return newStream(d, deflate(data, fast)) }

func newStream(d Dict, compressed []byte) *Stream {
	d["Filter"] = Name("FlateDecode")
	return &Stream{d, compressed}
}

// writers are compressors to be used again: each takes most of a MiB.
var writers = map[int]*sync.Pool{
	zlib.DefaultCompression: {New: func() any { return newWriter(zlib.DefaultCompression) }},
	fast:                    {New: func() any { return newWriter(fast) }},
}

func newWriter(level int) *zlib.Writer {
	z, err := zlib.NewWriterLevel(io.Discard, level)
	if err != nil {
		panic("syntax: unknown level of compression")
	}
	return z
}

func deflate(data []byte, level int) []byte {
	pool := writers[level]
	z := pool.Get().(*zlib.Writer)
	defer pool.Put(z)
	var b bytes.Buffer
	z.Reset(&b)
	_, _ = z.Write(data) // a bytes.Buffer takes everything
	_ = z.Close()
	return b.Bytes()
}
