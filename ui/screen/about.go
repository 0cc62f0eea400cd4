package screen

import (
	"strings"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// newAbout is what there is to know about the place of the cursor: a slot, the
// composition, or the finding.
func newAbout(m *model) panel {
	if in, ok := m.input(); ok {
		return aboutInput(in, nil, m)
	}
	if l, ok := m.list(); ok {
		text := []string{l.Help(), "", "Now: " + l.Show(m.style()) + "."}
		if l.Key() == "component" {
			text = append(append(answer.Components(m.env, m.scenario), ""), l.Help())
		}
		return aboutReader(l.Says(), text, nil, m)
	}
	if m.cursor == answer.Further {
		text := []string{"What the sentence does not name: choices that are at their usual value, and what only concerns table and picture. " +
			"A choice that is not the usual one gets a slot of its own.", ""}
		for _, in := range answer.FurtherInputs(m.question, &m.scenario) {
			text = append(text, in.Says()+": "+in.Show(m.style()))
		}
		return aboutReader("all else", text, nil, m)
	}
	text := []string{m.question.Says}
	for _, part := range [][]string{m.answer.Finding, m.answer.Why} {
		for _, p := range part {
			text = append(text, "", p)
		}
	}
	return aboutReader("finding", text, nil, m)
}

// aboutInput is what one input means, what it takes, and where its default comes
// from.
func aboutInput(in scenario.Input, back panel, m *model) panel {
	now := "Now: " + in.Show(m.style())
	if in.IsDefault() {
		now += ", the default"
	}
	text := []string{in.Help(), "", now + "."}
	if r := in.Range(); r != "" && in.Kind() != scenario.Choice {
		text = append(text, "Range: "+r+".")
	}
	if words := in.Choices(); len(words) > 0 && len(words) <= fewWords {
		text = append(text, "", "Words:")
		for _, o := range words {
			line := "  " + o.Word
			if o.Says != "" && o.Says != o.Word {
				line += ": " + o.Says
			}
			text = append(text, line)
		}
	}
	if from := in.Origin(); from != "" {
		text = append(text, "", "Origin of the default: "+strings.TrimSuffix(from, ".")+".")
	}
	if !in.Used() {
		text = append(text, "", "The question as it stands does not look at it.")
	}
	text = append(text, "", "Option and key of the scenario file: "+in.Key())
	return aboutReader(in.Says(), text, back, m)
}

// fewWords are as many as help somebody who reads; the catalogue is a list to
// look things up in.
const fewWords = 9

func aboutReader(title string, text []string, back panel, m *model) panel {
	return &reader{title: "About: " + title, text: text, opener: m.keys.About, back: back}
}
