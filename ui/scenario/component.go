package scenario

import (
	"fmt"
	"strings"
)

// componentList is what a particle is made of.
var componentList = list[Component]{
	key: "component", says: "composition",
	help: "What the dry particle is made of: a substance of the catalogue with share=, or one's own matter with kappa=, density=, " +
		"molar-mass=, ions=, solubility=. Shares are scaled so that they add up to 1.",
	rows:     func(s *Scenario) *[]Component { return &s.Components },
	fields:   componentFields,
	standard: func() Component { return defaultComponent("ammonium sulfate") },
	blank:    func() Component { return defaultComponent("") },
	another:  anotherComponent,
	least:    1,
	most:     20, // aerosol models use ten at most
	first:    "substance",
	show:     showComponents,
}

// tables are the row lists of a scenario.
func tables(s *Scenario) []table {
	return []table{rowsOf[Component]{&componentList, s}, rowsOf[Film]{&filmList, s}, rowsOf[Isotherm]{&isothermList, s},
		rowsOf[Mode]{&modeList, s}, rowsOf[DataFile]{&dataList, s}, rowsOf[MapLine]{&mapList, s}, rowsOf[Rule]{&ruleList, s},
		rowsOf[Point]{&pointList, s}, rowsOf[DataFile]{&scanList, s}, rowsOf[MapLine]{&scanMapList, s}, rowsOf[Uncertainty]{&uncertaintyList, s}, rowsOf[Counted]{&countedList, s}}
}

// anotherComponent is a substance that is not there yet, the most common ones
// first.
func anotherComponent(s *Scenario) Component {
	there := map[string]bool{}
	for _, c := range s.Components {
		there[c.Substance] = true
	}
	names := []string{"ammonium sulfate", "sodium chloride"}
	for _, x := range s.catalogue().All() {
		names = append(names, x.Name)
	}
	for _, name := range names {
		if !there[name] {
			return defaultComponent(name)
		}
	}
	return defaultComponent(names[0])
}

// showComponents names the components while they fit into a clause.
func showComponents(s *Scenario) string {
	const fits = 46
	text := componentsText(s)
	if len([]rune(text)) > fits {
		return fmt.Sprintf("%d components", len(s.Components))
	}
	return text
}

func componentsText(s *Scenario) string {
	switch len(s.Components) {
	case 0:
		return "unnamed matter"
	case 1:
		return componentName(s, 0)
	}
	total := 0.0
	for _, c := range s.Components {
		total += c.Share
	}
	var parts []string
	for i, c := range s.Components {
		parts = append(parts, fmt.Sprintf("%s %.2f", componentName(s, i), c.Share/total))
	}
	return strings.Join(parts, ", ")
}

func componentName(s *Scenario, i int) string {
	if name := s.Components[i].Substance; name != "" {
		return name
	}
	return fmt.Sprintf("component %d", i+1)
}
