// Package terminal is what dropcrest must know about the terminal it runs on:
// whether there is one, what it can show, how its keys arrive, and which signal
// ended the program.
package terminal
