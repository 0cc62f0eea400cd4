package scenario

import "fmt"

// Changes says in words how b differs from a: "kappa 0.65 → 0.61".
func Changes(a, b Scenario) []string {
	var out []string
	compare := func(before, after []Input) {
		for i, in := range before {
			was, is := in.Show(Style{}), after[i].Show(Style{})
			if was != is {
				out = append(out, in.Says()+" "+was+" → "+is)
			}
		}
	}
	compare(ownInputs(&a), ownInputs(&b))
	after := Lists(&b)
	for i, l := range Lists(&a) {
		if l.Len() != after[i].Len() {
			out = append(out, l.Says()+" "+l.Show(Style{})+" → "+after[i].Show(Style{}))
			continue
		}
		for row := range l.Len() {
			compare(l.Row(row), after[i].Row(row))
		}
	}
	return out
}

// Check says which values contradict each other.
func Check(s *Scenario) []*ValueError {
	var problems []*ValueError
	for i, p := range s.Measurements {
		if problem, right := checkPoint(p); problem != "" {
			problems = append(problems, &ValueError{Path: Path(fmt.Sprintf("point[%d].dry-diameter", i)), Problem: problem, Right: right})
		}
	}
	if len(problems) > 0 {
		return problems
	}
	if s.FromRadius.Word == "" && s.ToRadius.Word == "" && s.FromRadius.Number >= s.ToRadius.Number {
		return []*ValueError{{Path: "from-radius", Given: wetRadius.show(s.FromRadius.Number),
			Problem: "the first wet radius, " + wetRadius.show(s.FromRadius.Number) + ", is not below the last one",
			Right:   "less than " + wetRadius.show(s.ToRadius.Number)}}
	}
	if len(s.Szyszkowski) > 0 && !s.SurfaceTension.Is("water") {
		return []*ValueError{{Path: "szyszkowski", Given: filmList.show(s),
			Problem: "a surface-active film lowers the tension of pure water, and the surface tension is another one",
			Right:   "surface-tension water"}}
	}
	return nil
}
