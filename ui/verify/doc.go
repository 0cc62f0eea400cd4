// Package verify recomputes published check values.
package verify
