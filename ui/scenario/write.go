package scenario

import (
	"bytes"
	"fmt"
	"io"

	"github.com/pelletier/go-toml/v2"
)

// fileVersion is the version of the scenario file. It grows when an older program
// could not make sense of a file.
const fileVersion = 1

const versionKey = "dropcrest-scenario"

// Encode writes a scenario file that Decode reads back without loss. Values that
// the catalogue gives are left out.
func Encode(w io.Writer, s Scenario) error {
	var b bytes.Buffer
	fmt.Fprintf(&b, "# A question for dropcrest. dropcrest curve --help explains the keys.\n%s = %d\n", versionKey, fileVersion)
	for i := range fields {
		if err := writeKey(&b, slot[Scenario]{field: &fields[i], r: &s}.entry()); err != nil {
			return err
		}
	}
	for _, t := range tables(&s) {
		for row := range t.Len() {
			fmt.Fprintf(&b, "\n[[%s]]\n", t.Key())
			for _, e := range t.entries(row) {
				if err := writeKey(&b, e); err != nil {
					return err
				}
			}
		}
	}
	_, err := w.Write(b.Bytes())
	return err
}

// entry is a key with its value, quoted when it is text or has a unit.
type entry struct {
	key   string
	value string
	bare  bool
}

func (i slot[R]) entry() entry {
	bare := !i.isWord() && i.uncertain() == nil && !i.several && i.quantity.units[0].name() == ""
	return entry{i.key, i.exact(), bare}
}

func writeKey(b *bytes.Buffer, e entry) error {
	if e.bare {
		fmt.Fprintf(b, "%s = %s\n", e.key, e.value)
		return nil
	}
	text, err := toml.Marshal(map[string]string{e.key: e.value})
	if err != nil {
		return fmt.Errorf("%s: %w", e.key, err)
	}
	b.Write(text)
	return nil
}
