package command

import (
	"context"
	"os"

	tea "github.com/charmbracelet/bubbletea"
)

// MainPanicking is Main with a screen that panics at the key "P".
func MainPanicking(args []string) int {
	return run(context.Background(), args, world{in: os.Stdin, out: os.Stdout, err: os.Stderr, env: os.Getenv,
		model: func(m tea.Model) tea.Model { return panicking{m} }})
}

type panicking struct{ tea.Model }

func (p panicking) Update(msg tea.Msg) (tea.Model, tea.Cmd) {
	if k, ok := msg.(tea.KeyMsg); ok && k.String() == "P" {
		panic("a fault that was asked for")
	}
	m, cmd := p.Model.Update(msg)
	return panicking{m}, cmd
}
