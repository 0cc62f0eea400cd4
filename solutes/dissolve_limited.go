package solutes

import (
	"math"
)

// sparing is the C (m³ of compound per m³ of water) below which a solubility
// limits activation (Petters & Kreidenweis 2008): above it a compound dissolves
// before the drop is anywhere near its crest.
const sparing = 0.1

// limit returns the solubility C that counts for a substance. That of a salt does
// not, unless a user gives it: its deliquescence data rule, and κ and C would
// imply a second, wrong deliquescence humidity.
func (s Substance) limit() (solubility float64, ok bool) {
	c := s.VolumeSolubility
	if !c.Known() {
		return 0, false
	}
	if c.Evidence == User {
		return c.Value, true
	}
	if s.Insoluble() || s.Ion != nil || hasOwnModel(s) {
		return 0, false
	}
	return c.Value, c.Value < sparing
}

// limits notes the parts whose solubility is a limit.
func (d *dissolving) limits() {
	for _, p := range mergeParts(d.Parts) {
		if c, ok := p.Substance.limit(); ok {
			d.out.Limits = append(d.out.Limits, Limit{
				Substance: p.Substance.called(), Solubility: c, Water: p.Volume / c,
				Kept: d.Solubility == LimitedSolubility,
			})
		}
	}
}

// oneKappa makes the solution of a particle with one given κ.
func (d *dissolving) oneKappa() error {
	k := d.Recipe.Kappa
	if d.Solubility == LimitedSolubility && len(d.Parts) == 1 {
		return d.kappaParts([]kappaPart{{d.Parts[0], k}})
	}
	if d.Solubility == LimitedSolubility {
		for i := range d.out.Limits {
			d.out.Limits[i].Kept = false
		}
		d.note("solubility-unused", inputSolubility,
			"One κ is given for the whole particle: it counts as completely soluble.")
	}
	d.out.Solution = Kappa(k)
	return nil
}

// kappaPart is a part with the κ by which it counts.
type kappaPart struct {
	Part
	kappa float64
}

// kappaParts makes the solution of parts of constant κ.
func (d *dissolving) kappaParts(parts []kappaPart) error {
	if d.Solubility == LimitedSolubility && len(d.out.Limits) > 0 {
		return d.limitedParts(parts)
	}
	if d.Solubility == LimitedSolubility {
		d.note("no-solubility-limit", inputSolubility,
			"No part of this particle is sparingly soluble as far as is known: all that is soluble dissolves at once.")
	}
	sum := 0.0
	for _, p := range parts {
		sum += p.Volume * p.kappa
	}
	d.out.Solution = Kappa(sum)
	return nil
}

// limitedParts keeps each sparingly soluble part by itself; all that dissolves at
// once is one part, and what is insoluble only fills its share of the volume.
func (d *dissolving) limitedParts(parts []kappaPart) error {
	var limited []LimitedPart
	var names []Substance
	miscible := LimitedPart{Solubility: math.Inf(1)}
next:
	for _, p := range parts {
		c, ok := p.Substance.limit()
		if !ok && p.Substance.Insoluble() {
			d.insolubleKappa(p)
			continue
		}
		if !ok {
			miscible.Volume += p.Volume
			miscible.Kappa += p.Volume * p.kappa
			continue
		}
		for i, s := range names {
			if s.same(p.Substance) {
				limited[i].Volume += p.Volume
				continue next
			}
		}
		names = append(names, p.Substance)
		limited = append(limited, LimitedPart{p.Volume, p.kappa, c})
		d.saltNote(p, c)
	}
	if miscible.Volume > 0 {
		miscible.Kappa /= miscible.Volume
		limited = append(limited, miscible)
	}
	solution, err := NewLimited(limited)
	if err != nil {
		return err
	}
	d.says("solubility: limited (Petters & Kreidenweis 2008)")
	d.out.Solution = solution
	return nil
}

func (d *dissolving) insolubleKappa(p kappaPart) {
	if p.kappa > 0 {
		d.note("insoluble-kappa-left-out", inputSolubility,
			"%s counts as insoluble: its κ of %.4g is left out where solubility is limited.", p.Substance.called(), p.kappa)
	}
}

// saltNote says which deliquescence humidity the given solubility of a salt would
// imply.
func (d *dissolving) saltNote(p kappaPart, c float64) {
	s := p.Substance
	drh, known := s.DeliquescenceHumidity(d.Temperature)
	if !known || s.Ion == nil && !hasOwnModel(s) {
		return
	}
	d.note("solubility-of-salt", inputSolubility,
		"The κ and solubility given for %s imply a deliquescence at %.3g %% humidity; measured is %.3g %%.",
		s.called(), 100/(1+p.kappa*c), 100*drh)
}
