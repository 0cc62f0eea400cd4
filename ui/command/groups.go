package command

import (
	"strings"

	"dropcrest/ui/scenario"
)

// placeholder stands for the value in the help text.
func placeholder(in scenario.Input) string {
	switch in.Kind() {
	case scenario.Choice:
		return "WORD"
	case scenario.File:
		return "FILE"
	case scenario.Numbers:
		return "VALUE,..."
	}
	return "VALUE"
}

// inputHelp is the help text of an option, made of the declaration of its input.
func inputHelp(in scenario.Input) string {
	text := sentence(in.Help())
	if r := in.Range(); r != "" && in.Kind() != scenario.File {
		text += " " + sentence("Range: "+r)
	}
	if in.Kind() == scenario.Choice {
		var words []string
		for _, c := range in.Choices() {
			words = append(words, c.Word)
		}
		text = sentence(in.Help()) + " One of: " + strings.Join(words, ", ") + "."
	}
	_, value := in.SI()
	word, isWord := value.(string)
	if !isWord || word == "" {
		word = in.Show(scenario.Style{})
	}
	return text + " " + sentence("Default: "+word)
}

// sentence ends a text with a full stop.
func sentence(text string) string {
	if text == "" || strings.HasSuffix(text, ".") || strings.HasSuffix(text, "?") {
		return text
	}
	return text + "."
}
