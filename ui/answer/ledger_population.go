package answer

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/koehler/ledger"
	"dropcrest/ui/scenario"
)

// many is a ledger of many particles: its question, asked again and again.
type many struct {
	env   Env
	asked scenario.Scenario
	known []knownLedger
	full  ledger.Values
	kinds *kinds // of particles there are
	rises bool   // they are in rising air
	// values answers a scenario, with the models that env assumes.
	values func(env Env, s scenario.Scenario) (ledger.Values, error)
}

// by is the environment in which particles are made with an assumption, or as the
// fullest model where key is "".
func (m *many) by(key ledger.Key, against bool) Env {
	env := m.env
	env.assuming = &assuming{key: key, against: against, known: &m.known, rises: m.rises}
	return env
}

// fullest is the answer to the question with an edit, by the fullest models.
func (m *many) fullest(edit func(*scenario.Scenario)) (ledger.Values, error) {
	s := m.asked.Clone()
	edit(&s)
	return m.values(m.by("", false), s)
}

// change is simplified minus full in per cent of full; what rounding leaves is nothing.
func change(simplified, full ledger.Values) ledger.Values {
	const rounding = 1e-9
	var c ledger.Values
	for o := range c {
		if c[o] = 100 * (simplified[o]/full[o] - 1); math.Abs(c[o]) < rounding {
			c[o] = 0
		}
	}
	return c
}

func noChange() ledger.Values { return ledger.Values{math.NaN(), math.NaN(), math.NaN()} }

// ofParticles are the rows of what is assumed of single particles.
func (m *many) ofParticles() []assumed {
	var rows []assumed
	for _, a := range ledger.Assumptions() {
		if a.Key == ledger.Sphere {
			continue // of the instrument here, not of the particles
		}
		row := m.status(a)
		switch {
		case row.status == ledger.Known && a.Key == ledger.TextbookCubic && m.rises:
			row.status, row.reason = ledger.NotKnown, "An ascent follows each drop along its whole curve; the closed forms have rows of their own."
		case row.status == ledger.Known:
			m.compare(&row)
		}
		rows = append(rows, row)
	}
	return rows
}

// status is what the ledgers of the particles say of an assumption. One of several
// kinds of particles that can make it is enough.
func (m *many) status(a ledger.Assumption) assumed {
	row := assumed{Assumption: a, status: ledger.NotApplicable, change: noChange(), ifChange: noChange()}
	for i, l := range m.kinds.of {
		for _, r := range l.Rows {
			if r.Key != a.Key {
				continue
			}
			row.made = row.made || r.Made
			if i == 0 || r.Status < row.status {
				row.status, row.reason = r.Status, r.Reason
			}
		}
	}
	if row.status == ledger.Known {
		row.reason = "" // it may name what belongs to one size
	}
	return row
}

// compare asks the question with the assumption, and with what it is compared with.
func (m *many) compare(row *assumed) {
	asked, full := m.asked, m.full
	alone := row.Key == ledger.CompleteDissolution
	if m.rises && row.Key == ledger.IncompressibleLiquid {
		alone = true
		if asked.KappaSpread > 1 { // which the compressed liquid cannot have
			asked.KappaSpread = 1
			row.reason = "Both answers are without the spread of κ."
		}
	}
	simplified, err := m.values(m.by(row.Key, false), asked)
	if err == nil && alone {
		full, err = m.values(m.by(row.Key, true), asked)
	}
	if err != nil {
		row.fails(err)
		return
	}
	row.change = change(simplified, full)
	if m.rises && row.Key == ledger.Convention25C {
		row.reason = "The air keeps its temperature: the surface tension alone is that of the convention."
	}
}

// fails says why a row has no number.
func (r *assumed) fails(err error) {
	r.status, r.reason = ledger.NotKnown, "It cannot be worked out: "+reason(err)+"."
}

// edited is the row of an assumption that is an edit of the scenario.
func (m *many) edited(row assumed, edit func(*scenario.Scenario)) assumed {
	simplified, err := m.fullest(edit)
	if err != nil {
		row.fails(err)
		return row
	}
	row.change = change(simplified, m.full)
	return row
}

// iffy is a row without a number of its own: what it would cost if the world were
// as the edit says, which the answer is taken to simplify.
func (m *many) iffy(row assumed, says string, edit func(*scenario.Scenario)) assumed {
	row.status = ledger.NotKnown
	fuller, err := m.fullest(edit)
	if err != nil {
		row.fails(err)
		return row
	}
	row.ifSays, row.ifChange = says, change(m.full, fuller)
	return row
}

// because gives a row its reason where it has none.
func (r assumed) because(reason string) assumed {
	if r.reason == "" {
		r.reason = reason
	}
	return r
}

// mixing is the row of how components are shared out among the particles.
func (m *many) mixing() assumed {
	row := newAssumed(mixingState)
	if !m.isMixed() {
		row.status, row.reason = ledger.NotApplicable, "The particles are of one component each, as far as the question says."
		return row
	}
	if m.asked.Mixing == "external" {
		return m.edited(row, func(s *scenario.Scenario) { s.Mixing = "internal" })
	}
	row.made = true
	row = m.iffy(row, "if each component is in particles of its own", func(s *scenario.Scenario) { s.Mixing = "external" })
	return row.because("Which of the two is nearer to the truth is not known from the data.")
}

// isMixed tells whether particles of several components are asked about.
func (m *many) isMixed() bool {
	s := m.asked
	switch s.Population {
	case "modes":
		for _, mode := range s.Modes {
			if !hasOwnMatter(mode) {
				return len(s.Components) > 1
			}
		}
		return false
	case "bins":
		return len(s.Components) > 1
	}
	return s.Composition == "measured" || len(s.Components) > 1
}

// spread is the row of κ that is the same in all particles.
func (m *many) spread() assumed {
	row := newAssumed(kappaSpread)
	switch {
	case !m.kinds.activates():
		row.status, row.reason = ledger.NotApplicable, "Nothing in the particles takes up water by a κ that could differ."
		return row
	case m.asked.KappaSpread > 1:
		return m.edited(row, func(s *scenario.Scenario) { s.KappaSpread = 1 })
	}
	row.made = true
	row = m.iffy(row, "if κ has a geometric standard deviation of "+shortest(otherSpread), func(s *scenario.Scenario) { s.KappaSpread = otherSpread })
	return row.because("How κ differs between particles of one size is not given.")
}

// sizeInputs are the uncertainties of sizes and numbers.
func (m *many) sizeInputs() []ledger.Input {
	const counting = 0.05
	in := []ledger.Input{ledger.SizingInput(ledger.Sizes, 1),
		{Quantity: ledger.Numbers, Value: 1, StandardUncertainty: counting, Source: "common practice: 5 % of a particle counter"}}
	if shape := m.asked.ShapeFactor; m.isMobility() && shape > 1 {
		in = append(in, ledger.ShapeInput(shape))
	}
	return in
}

// isMobility tells whether sizes are measured mobility diameters.
func (m *many) isMobility() bool {
	return m.asked.DrySizeIs == "mobility" && m.asked.Population != "modes"
}

// sizeFactor is what errors of sizing and of the shape factor make of the
// volume-equivalent size at a dry diameter (m).
func sizeFactor(s scenario.Scenario, dry float64, x *ledger.Deviation) float64 {
	by := 1 + x[ledger.Sizes]
	if off := x[ledger.ShapeFactor]; off != 0 {
		T, p := s.Temperature, atmos.StandardPressure
		by *= atmos.VolumeEquivalent(dry, math.Max(1, s.ShapeFactor+off), T, p) / atmos.VolumeEquivalent(dry, s.ShapeFactor, T, p)
	}
	return by
}
