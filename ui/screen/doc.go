// Package screen is the Bubble Tea program: the statement a person edits, the
// picture and the finding that follow from it.
package screen
