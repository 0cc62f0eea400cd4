package substancefile

import (
	"strings"

	"github.com/pelletier/go-toml/v2/unstable"

	"dropcrest/ui/scenario"
)

// places knows where everything stands in a TOML text: values by a path such as
// "substance[1].ion.beta0", keys by keyOf of that.
type places struct {
	parser unstable.Parser
	ranges map[string]unstable.Range
	tables map[string]int // how often [[table]] of that path has begun
}

// placesOf walks through a text whose syntax was checked.
func placesOf(text []byte) *places {
	p := &places{ranges: map[string]unstable.Range{}, tables: map[string]int{}}
	p.parser.Reset(text)
	in := ""
	for p.parser.NextExpression() {
		switch e := p.parser.Expression(); e.Kind {
		case unstable.KeyValue:
			p.keyValue(in, e)
		case unstable.Table, unstable.ArrayTable:
			in = p.table(e)
		}
	}
	return p
}

// table is the path of the table that begins.
func (p *places) table(n *unstable.Node) string {
	path := ""
	for it := n.Key(); it.Next(); {
		key := it.Node()
		path = joined(path, string(key.Data))
		at := scenario.NodeRange(&p.parser, key)
		if it.IsLast() && n.Kind == unstable.ArrayTable {
			p.tables[path]++
		}
		p.put(keyOf(path), at)
		p.put(path, at)
		if i := p.tables[path]; i > 0 {
			path = item(path, i-1)
			p.put(path, at)
		}
	}
	return path
}

func (p *places) keyValue(in string, n *unstable.Node) {
	path := in
	var at unstable.Range
	for it := n.Key(); it.Next(); {
		path = joined(path, string(it.Node().Data))
		at = scenario.NodeRange(&p.parser, it.Node())
		p.put(keyOf(path), at)
		p.put(path, at) // also of the tables that a dotted key makes
	}
	p.value(path, n.Value(), at)
}

// value notes a value and what is in it; key is where its key stands.
func (p *places) value(path string, n *unstable.Node, key unstable.Range) {
	at := scenario.NodeRange(&p.parser, n)
	if at.Length == 0 {
		at = key // an empty list
	}
	p.ranges[path] = at
	switch n.Kind {
	case unstable.Array:
		i := 0
		for it := n.Children(); it.Next(); i++ {
			p.value(item(path, i), it.Node(), at)
		}
	case unstable.InlineTable:
		for it := n.Children(); it.Next(); {
			p.keyValue(path, it.Node())
		}
	}
}

// put notes a place; the first one counts.
func (p *places) put(path string, at unstable.Range) {
	if _, there := p.ranges[path]; !there {
		p.ranges[path] = at
	}
}

func (p *places) has(path string) bool {
	_, there := p.ranges[path]
	return there
}

// offset is where a path stands in the text, or the nearest table around it.
func (p *places) offset(path string) int {
	for {
		if at, there := p.ranges[path]; there {
			return int(at.Offset)
		}
		cut := strings.LastIndexAny(path, ".[")
		if cut < 0 {
			return 0
		}
		path = strings.TrimPrefix(path[:cut], "=")
	}
}

// position is the line and column of an offset.
func (p *places) position(offset int) unstable.Position {
	return p.parser.Shape(unstable.Range{Offset: uint32(offset)}).Start
}
