// Package dark tells Lip Gloss that the background is dark, so that nobody asks
// the terminal. It is imported for that effect alone, by whoever imports Bubble
// Tea.
//
// Bubble Tea v1 asks the terminal for its background colour while packages
// initialise, before main runs. Where nothing answers (a serial line, a mute
// multiplexer, a script on a pty) every command then waits five seconds, even
// --version. The answer must therefore be there earlier still, and only an init
// function can be that early.
//
// Why it is early enough: of the packages whose imports are ready, Go initialises
// the one whose import path sorts first. This package and Bubble Tea both become
// ready with Lip Gloss, and "dropcrest/ui/dark" sorts before
// "github.com/charmbracelet/bubbletea". So this package imports Lip Gloss and
// nothing else; another import could make it ready too late.
//
// dropcrest takes its colours from the sixteen of the terminal and leaves the
// background alone, so what is answered here decides no colour of its own.
package dark

import "github.com/charmbracelet/lipgloss"

// The one init of the project; the package comment says why it must be one.
func init() { lipgloss.SetHasDarkBackground(true) }
