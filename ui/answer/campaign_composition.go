package answer

import (
	"math"

	"dropcrest/koehler/spectrum"
	"dropcrest/ui/fieldfile"
)

// massParts are the parts of a composition that there are columns for.
type massParts map[fieldfile.Quantity]bool

// ofComposition are the parts that mass spectrometers report.
var ofComposition = []fieldfile.Quantity{fieldfile.Organic, fieldfile.Sulfate, fieldfile.Nitrate, fieldfile.Ammonium, fieldfile.Chloride}

func partsOf(files []*fieldfile.File) massParts {
	p := massParts{}
	for _, f := range files {
		for _, r := range f.Roles() {
			p[r.Quantity] = true
		}
	}
	return p
}

// compose is κ of what was measured of the composition. Where a part that is
// measured is missing in a record, what is left would be another aerosol: then κ
// is not known.
func (r *recorder) compose(o *observation, s *fieldfile.Sample) {
	if k := s.Values[fieldfile.Kappa]; k.OK() {
		o.kappa, o.kappaFrom = k.X, "kappa of the data"
		return
	}
	known, missing := 0, 0
	for _, q := range ofComposition {
		switch {
		case s.Values[q].State != fieldfile.Missing:
			known++
		case r.parts[q]:
			missing++
		}
	}
	switch {
	case known == 0:
		return
	case missing > 0:
		r.note(o, "composition-incomplete", "data", "Where a part of the composition is missing in a record, kappa is that of the question.")
		return
	case !r.parts[fieldfile.Organic] || !r.parts[fieldfile.Sulfate]:
		r.note(o, "composition-in-part", "data", "The data have no column of organic matter or none of sulfate: what was not measured is taken as none.")
	}
	if r.parts[fieldfile.BlackCarbon] && s.Values[fieldfile.BlackCarbon].State == fieldfile.Missing {
		r.note(o, "black-carbon-missing", "data", "Where black carbon is missing in a record it is taken as none.")
	}
	mixed, err := spectrum.Mix(ionsOf(s), spectrum.CommonSpecies())
	if err != nil {
		r.note(o, "composition-not-usable", "data", "The composition of a record cannot be used: "+reason(err)+".")
		return
	}
	o.kappa, o.kappaFrom, o.species = mixed.Kappa, "the composition that was measured, ions paired and mixed by volume", mixed.Parts
	for _, n := range mixed.Notes {
		r.note(o, n.Code, "data", n.Text)
	}
}

// ionsOf are the masses of a sample: below the limit of detection they are none, and
// noise about zero is no mass.
func ionsOf(s *fieldfile.Sample) spectrum.Ions {
	mass := func(q fieldfile.Quantity) float64 {
		if c := s.Values[q]; c.State == fieldfile.Value {
			return math.Max(c.X, 0)
		}
		return 0
	}
	return spectrum.Ions{Organic: mass(fieldfile.Organic), Sulfate: mass(fieldfile.Sulfate), Nitrate: mass(fieldfile.Nitrate),
		Ammonium: mass(fieldfile.Ammonium), Chloride: mass(fieldfile.Chloride), BlackCarbon: mass(fieldfile.BlackCarbon)}
}
