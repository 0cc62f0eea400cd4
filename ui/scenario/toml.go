package scenario

import (
	"errors"
	"fmt"
	"io"
	"strings"

	"github.com/pelletier/go-toml/v2"
	"github.com/pelletier/go-toml/v2/unstable"

	"dropcrest/ui/plain"
)

// largest is far more than any file of ours. It keeps a wrong one from filling the
// memory, and from taking its time: go-toml looks for keys that stand twice in a
// time that grows with the square of their number, 21 s for the 90 000 of 1 MiB.
const largest = 128 << 10

// ReadTOML reads a TOML file of at most 128 KiB, as text and as a tree. what names
// such a file in words. What is wrong with the file is FileErrors.
func ReadTOML(name string, r io.Reader, what string) (text []byte, tree map[string]any, err error) {
	text, err = io.ReadAll(io.LimitReader(r, largest+1))
	if err != nil {
		return nil, nil, err
	}
	if len(text) > largest {
		return nil, nil, FileErrors{{name, 1, 1, "", fmt.Errorf("larger than 128 KiB, which no %s is", what)}}
	}
	if err := toml.Unmarshal(text, &tree); err != nil {
		return nil, nil, syntaxError(name, err)
	}
	return text, tree, nil
}

func syntaxError(name string, err error) FileErrors {
	var at *toml.DecodeError
	if !errors.As(err, &at) {
		return FileErrors{{name, 1, 1, "", errors.New(plain.Clean(err.Error()))}}
	}
	line, column := at.Position()
	text := strings.TrimPrefix(at.Error(), "toml: ")
	return FileErrors{{name, line, column, plain.Clean(strings.Join(at.Key(), ".")), errors.New("no TOML: " + plain.Clean(text))}}
}

// NodeRange is where a node of TOML stands in its text. An array stands where its
// first item does, and an empty one nowhere: its range is empty.
func NodeRange(p *unstable.Parser, n *unstable.Node) unstable.Range {
	for n.Kind == unstable.Array {
		items := n.Children()
		if !items.Next() {
			return unstable.Range{}
		}
		n = items.Node()
	}
	if n.Raw.Length == 0 && len(n.Data) > 0 {
		return p.Range(n.Data)
	}
	return n.Raw
}
