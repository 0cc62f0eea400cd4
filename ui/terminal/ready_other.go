//go:build !unix

package terminal

import "time"

// ready never waits: a console that hands over keys, not bytes, does not split
// them.
func (in *Input) ready(time.Duration) bool { return false }
