package command

import (
	"strings"

	"dropcrest/ui/scenario"
)

// inputGroup is one group of options under a heading of the help text.
type inputGroup struct {
	title string
	keys  []string // inputs and row lists
}

// inputGroups is the order of the options. A test holds that no input is left out.
func inputGroups() []inputGroup {
	return []inputGroup{
		{"The dry particle", []string{"dry-diameter", "dry-size-is", "shape-factor", "component", "shares-by", "adsorption"}},
		{"The solution", []string{"water-activity", "kappa", "vant-hoff-factor", "solubility", "surface-tension", "szyszkowski", "partitioning", "tolman", "solution-density", "kelvin"}},
		{"The air", []string{"temperature", "relative-humidity", "humidity-history"}},
		{"Table and picture", []string{"points", "from-radius", "to-radius"}},
	}
}

// placeholder stands for the value in the help text.
func placeholder(in scenario.Input) string {
	if in.Kind() != scenario.Choice {
		return "VALUE"
	}
	return "WORD"
}

// inputHelp is the help text of an option, made of the declaration of its input.
func inputHelp(in scenario.Input) string {
	text := sentence(in.Help())
	if r := in.Range(); r != "" {
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
