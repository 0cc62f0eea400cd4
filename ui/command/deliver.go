package command

import (
	"fmt"

	"dropcrest/ui/whole"
)

// deliver writes a finished output to a file or to standard output.
func (w world) deliver(out string, data []byte) error {
	if out == "" || out == "-" {
		if _, err := w.out.Write(data); err != nil {
			return fmt.Errorf("standard output: %w", whole.Reason(err))
		}
		return nil
	}
	if err := whole.Write(out, data); err != nil {
		return fmt.Errorf("--out %s: %w", out, whole.Reason(err))
	}
	return nil
}
