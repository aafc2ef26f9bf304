package design

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"strings"

	yaml "go.yaml.in/yaml/v4"
	"go.yaml.in/yaml/v4/plugin/loaderlimits"
)

// maxDepth is how deep a design file may nest.
const maxDepth = 32

// parse turns YAML text into nodes. It returns nil if there is nothing to
// walk; then p says why.
func parse(src []byte, p *problems) *node {
	doc, err := parseYAML(src)
	var syntax *yaml.LoadError
	switch {
	case err == nil:
		if n := convert(doc, p); n.kind != null {
			return n
		}
		fallthrough
	case errors.Is(err, io.EOF):
		p.problem(Pos{}, say("`linewitness starter FILE` writes a commented design file to begin from"), "the file has no content")
	case errors.Is(err, errSecondDocument):
		p.problem(Pos{doc.Line, max(doc.Column, 1)}, say("a design file is one document; delete the line --- or ... and put other designs in files of their own"), "a second document begins here")
	case errors.As(err, &syntax):
		p.syntaxProblem(syntax)
	default:
		p.problem(Pos{}, say("take parts of the file away until it reads, and look at the last part taken"), "not valid YAML: %s", err)
	}
	return nil
}

var errSecondDocument = errors.New("second document")

// parseYAML parses one document and looks for another. The parser is a
// library: should it panic on some input, that input is at fault as far as
// the user is concerned, and the other designs of the run go on.
func parseYAML(src []byte) (doc *yaml.Node, err error) {
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("the parser gave up (%v)", r)
		}
	}()
	loader, err := yaml.NewLoader(bytes.NewReader(src), yaml.WithPlugin(loaderlimits.New(loaderlimits.DepthValue(maxDepth))))
	if err != nil {
		return nil, err
	}
	doc, next := &yaml.Node{}, &yaml.Node{}
	if err := loader.Load(doc); err != nil {
		return nil, err
	}
	err = loader.Load(next)
	switch {
	case errors.Is(err, io.EOF):
		return doc, nil
	case err == nil && len(next.Content) > 0:
		return next.Content[0], errSecondDocument
	default:
		return doc, err
	}
}

func (p *problems) syntaxProblem(e *yaml.LoadError) {
	pos := Pos{e.Mark.Line, max(e.Mark.Column, 1)}
	if pos.Line == 0 {
		pos = Pos{}
	}
	h := say("indent with spaces, put a space after each colon, close every { and [, and quote texts that hold a colon or #")
	switch {
	case strings.Contains(e.Message, "max depth"):
		p.problem(pos, say("no design needs more than a handful of levels"), "nested more than %d levels deep", maxDepth)
		return
	case strings.Contains(e.Message, "cannot start any token"), strings.Contains(e.Message, "tab"):
		h = say("indent with spaces, not tabs; quote a text that begins with @, ` or %%")
	case e.ContextMark.Line > 0 && e.ContextMark.Line != e.Mark.Line:
		h = say("%s that began at line %d, column %d", e.ContextMsg, e.ContextMark.Line, e.ContextMark.Column)
	}
	p.problem(pos, h, "not valid YAML: %s", e.Message)
}

// convert makes nodes of the parser's, refusing what design files do not use.
func convert(y *yaml.Node, p *problems) *node {
	pos := Pos{y.Line, y.Column}
	n := &node{pos: pos}
	switch {
	case y.Kind == yaml.DocumentNode:
		return convert(y.Content[0], p)
	case y.Kind == yaml.AliasNode:
		p.problem(pos, say("write the value out; lines and cases are the ways to say a thing once"), "alias *%s: design files have no anchors and aliases", y.Value)
		n.kind = refused
		return n
	case y.Anchor != "":
		p.problem(pos, say("delete &%s", y.Anchor), "anchor &%s: design files have no anchors and aliases", y.Anchor)
	case y.Style&yaml.TaggedStyle != 0:
		p.problem(pos, say("delete the tag; what a value means follows from its key"), "tag %s: design files have no tags", y.Tag)
	}
	switch y.Kind {
	case yaml.MappingNode:
		n.kind = mapping
		n.pairs = convertPairs(y, p)
	case yaml.SequenceNode:
		n.kind = list
		for _, c := range y.Content {
			item := convert(c, p)
			if item.kind == null {
				p.problem(item.pos, say("give it a value or delete it"), "an entry of a list has no value")
			}
			n.items = append(n.items, item)
		}
	default:
		n.plain = y.Style&(yaml.SingleQuotedStyle|yaml.DoubleQuotedStyle|yaml.LiteralStyle|yaml.FoldedStyle) == 0
		n.text = strings.TrimSpace(y.Value)
		if n.plain && (n.text == "" || n.text == "~" || strings.EqualFold(n.text, "null")) {
			n.kind = null
		}
	}
	return n
}

func convertPairs(y *yaml.Node, p *problems) []pair {
	first := make(map[string]int, len(y.Content)/2)
	var pairs []pair
	for i := 0; i+1 < len(y.Content); i += 2 {
		k := y.Content[i]
		key, value := convert(k, p), convert(y.Content[i+1], p)
		switch line := first[key.text]; {
		case k.Kind != yaml.ScalarNode:
			if k.Kind != yaml.AliasNode {
				p.problem(key.pos, say("a key is a word followed by a colon"), "the key is not a word but %s", key.kind)
			}
		case key.plain && key.text == "<<":
			p.problem(key.pos, say("write the keys out; lines and cases are the ways to say a thing once"), "merge key <<: design files have no merge keys")
		case line > 0:
			p.problem(key.pos, say("keep one of the two"), "key %q is already on line %d", key.text, line)
		default:
			first[key.text] = key.pos.Line
			pairs = append(pairs, pair{key, value})
		}
	}
	return pairs
}
