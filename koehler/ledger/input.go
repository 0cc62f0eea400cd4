package ledger

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/solutes"
)

// Quantity names an input whose uncertainty the answer inherits.
type Quantity int

const (
	DryDiameter    Quantity = iota // m, as given
	ShapeFactor                    // of a mobility diameter
	Temperature                    // K; the tension of water follows it
	SurfaceTension                 // N/m, at the crest, beside what it owes to the temperature
	Hygroscopicity                 // κ at the crest: amount of solute and its activity
	Shares                         // κ, as far as it is open by the shares of the parts
	Solubility                     // m³ of compound per m³ of water
	AdsorptionA                    // of the isotherm of Frenkel, Halsey and Hill
	AdsorptionB                    // and the exponent of its layers
	FilmExcess                     // greatest surface excess, mol/m²
	FilmConstant                   // adsorption constant of the film, m³/mol

	// of populations and of rising air
	Sizes           // all dry sizes alike
	Numbers         // of all particles alike
	Supersaturation // at which droplets were counted, a fraction
	Updraft         // m/s
	Pressure        // Pa
	quantities
)

// Quantities returns all quantities in their order.
func Quantities() []Quantity {
	all := make([]Quantity, quantities)
	for i := range all {
		all[i] = Quantity(i)
	}
	return all
}

// Key returns the word that scripts see.
func (q Quantity) Key() string { return quantityWords[q].key }

// String returns the quantity in words.
func (q Quantity) String() string { return quantityWords[q].says }

// Unit returns the SI unit, "1" without one.
func (q Quantity) Unit() string { return quantityWords[q].unit }

var quantityWords = [quantities]struct{ key, says, unit string }{
	{"dry_diameter", "dry diameter", "m"},
	{"shape_factor", "shape factor", "1"},
	{"temperature", "temperature", "K"},
	{"surface_tension", "surface tension", "N/m"},
	{"hygroscopicity", "hygroscopicity", "1"},
	{"shares", "shares of the parts", "1"},
	{"solubility", "solubility", "1"},
	{"adsorption_a", "adsorption constant A", "1"},
	{"adsorption_b", "adsorption constant B", "1"},
	{"film_excess", "surface excess of the film", "mol/m²"},
	{"film_constant", "adsorption constant of the film", "m³/mol"},
	{"sizes", "dry sizes", "1"},
	{"numbers", "number of particles", "1"},
	{"supersaturation", "supersaturation of the counter", "1"},
	{"updraft", "updraft", "m/s"},
	{"pressure", "pressure", "Pa"},
}

// Input is a quantity with what is not known of it.
type Input struct {
	Quantity
	Value               float64 // in its Unit
	StandardUncertainty float64 // in its Unit, one standard deviation of a normal distribution
	Source              string  // of the uncertainty
}

// Standard uncertainties in use where nothing better is given.
const (
	usualSize        = 0.03  // relative, of a mobility spectrometer
	usualTemperature = 0.5   // K
	usualTension     = 0.005 // relative, of the formula of water
	usualGiven       = 0.01  // relative, of a tension that was given
	usualIncrement   = 0.2   // relative, of what the solute adds to the tension
	usualIons        = 0.02  // relative, of κ by ion interaction
	usualOwn         = 0.05  // relative, of κ by another model of one substance
	usualKappa       = 0.1   // relative, of a κ without bounds
	usualShare       = 0.1   // relative, of each share
	usualSolubility  = 0.2   // relative
	usualAdsorption  = 0.1   // relative, of A; half of it of B
	usualExcess      = 0.1   // relative
	usualFilm        = 0.3   // relative, of K
)

const commonPractice = "common practice"

// Inputs returns the inputs of the fullest model with the uncertainties that are
// usual. A caller who knows better sets StandardUncertainty; 0 leaves an input out.
func (l *Ledger) Inputs() []Input {
	a, d := l.full.asked, l.full.dissolved
	r := recipe{a.Recipe}
	in := []Input{SizingInput(DryDiameter, a.DryDiameter)}
	if a.Mobility && a.ShapeFactor > 0 {
		in = append(in, r.shapeInput(a.ShapeFactor))
	}
	in = append(in,
		Input{Temperature, a.Recipe.Temperature, usualTemperature, commonPractice},
		l.tensionInput())
	kappa := l.kappaValue()
	if kappa > 0 {
		u, source := r.kappaUncertainty(d.WaterDensity)
		in = append(in, Input{Hygroscopicity, kappa, u * kappa, source})
		if u := r.shareUncertainty(d.WaterDensity); u > 0 && d.Film == nil {
			in = append(in, Input{Shares, kappa, u * kappa, commonPractice + ": 10 % of each share"})
		}
	}
	if isKept(d) {
		c := d.Limits[0].Solubility
		in = append(in, Input{Solubility, c, usualSolubility * c, commonPractice})
	}
	if d.Core != nil {
		in = append(in, l.coreInputs()...)
	}
	if f := d.Film; f != nil {
		in = append(in, Input{FilmExcess, f.GammaMax, usualExcess * f.GammaMax, commonPractice},
			Input{FilmConstant, f.K, usualFilm * f.K, commonPractice})
	}
	return in
}

// bounded is the standard uncertainty that published bounds stand for: all between
// them equally likely (JCGM 100:2008, 4.3.7). 0: no bounds.
func bounded(d solutes.Datum) float64 {
	if !(d.High > d.Low) {
		return 0
	}
	return (d.High - d.Low) / math.Sqrt(12)
}

const boundsSource = "published bounds, all between them equally likely (JCGM 100, 4.3.7)"

// SizingSource says where the usual uncertainty of sizes is from.
const SizingSource = "sizing within 3 % of a reference at 203 nm, Wiedensohler et al. 2018, Aerosol Sci. Technol. 52, 146"

// SizingInput is a size, or a factor of sizes, with the uncertainty that is usual: 3 %
// (SizingSource).
func SizingInput(q Quantity, value float64) Input {
	return Input{q, value, usualSize * value, SizingSource}
}

// ShapeInput is a shape factor with the uncertainty that is usual: a third of what it
// differs from 1 by, 0.01 at least (common practice).
func ShapeInput(shape float64) Input {
	return Input{ShapeFactor, shape, math.Max(0.01, 0.3*(shape-1)), commonPractice + ": a third of what it differs from 1 by"}
}

func (r recipe) shapeInput(shape float64) Input {
	if len(r.Parts) == 1 && r.Parts[0].Substance.ShapeFactor.Value == shape {
		if u := bounded(r.Parts[0].Substance.ShapeFactor); u > 0 {
			return Input{ShapeFactor, shape, u, boundsSource}
		}
	}
	return ShapeInput(shape)
}

func (l *Ledger) tensionInput() Input {
	water := atmos.SurfaceTension(l.full.asked.Recipe.Temperature)
	in := Input{SurfaceTension, l.tension(), usualTension * water, "0.5 % of water, IAPWS R1-76(2014)"}
	switch t := l.full.particle.Tension.(type) {
	case solutes.LinearTension:
		in.StandardUncertainty = math.Hypot(in.StandardUncertainty, usualIncrement*(in.Value-water))
		in.Source += "; 20 % of what the solute adds, " + commonPractice
	case solutes.ConstantTension:
		if l.full.asked.Recipe.TensionRule == solutes.FixedTension {
			in.StandardUncertainty, in.Source = usualGiven*float64(t), commonPractice+": 1 % of a given one"
		}
	}
	return in
}

// tension is that of the flat surface of the drop at the crest; of a film that of
// pure water, beside which its constants stand.
func (l *Ledger) tension() float64 {
	p := l.full.particle
	if p.Tension == nil || l.full.dissolved.Film != nil {
		return atmos.SurfaceTension(p.Temperature)
	}
	u := l.Fullest.Crest.Water
	if l.Fullest.NoCrest != nil || !(u > 0) {
		u = 1e9 // dilute
	}
	sigma, _ := p.Tension.SurfaceTension(u)
	return sigma
}

// kappaValue is the κ that the solute stands for: at the crest, of a mixture with a
// film that of the rest, of a coat its own.
func (l *Ledger) kappaValue() float64 {
	d := l.full.dissolved
	switch {
	case d.Core != nil:
		return d.Core.Kappa * d.Core.SolubleShare
	case d.Film != nil && d.Film.RestShare == 0:
		return 0
	case d.Film != nil && d.Film.Rest == nil:
		return d.Film.RestKappa * d.Film.RestShare
	}
	if kappa, ok := kappaAt(l.Fullest); ok && !isKept(d) {
		return kappa
	}
	if k := d.Kappa; k >= 0 {
		return k
	}
	return 0
}

// kappaUncertainty is the relative standard uncertainty of the particle's κ: that
// of each part, mixed by volume.
func (r recipe) kappaUncertainty(waterDensity float64) (relative float64, source string) {
	if r.hasOneKappa() {
		return usualKappa, commonPractice + ": 10 % of a κ"
	}
	sum, total := 0.0, 0.0
	for _, p := range r.Parts {
		k := p.Volume * partKappa(p.Substance, waterDensity)
		u, says := r.partUncertainty(p.Substance)
		sum, total = math.Hypot(sum, k*u), total+k
		if k > 0 && source != "" && source != says {
			source = "of each part, mixed by volume"
		} else if k > 0 {
			source = says
		}
	}
	if !(total > 0) {
		return usualKappa, commonPractice + ": 10 % of a κ"
	}
	return sum / total, source
}

func (r recipe) partUncertainty(s solutes.Substance) (relative float64, source string) {
	switch {
	case r.Model == solutes.IonInteraction && s.Ion != nil:
		return usualIons, commonPractice + ": 1 % each of osmotic coefficient and dry density"
	case r.Model == solutes.IonInteraction && solutes.OwnModelWords(s) != "":
		return usualOwn, commonPractice + ": 5 % of a water activity model with its dry density"
	case s.Kappa.Known() && bounded(s.Kappa) > 0:
		return bounded(s.Kappa) / s.Kappa.Value, boundsSource
	}
	return usualKappa, commonPractice + ": 10 % of a κ"
}

// shareUncertainty is what shares that are known to 10 % each leave open of the
// particle's κ, relative; 0 for one part.
func (r recipe) shareUncertainty(waterDensity float64) float64 {
	mean := r.kappa(waterDensity)
	if r.hasOneKappa() || len(r.Parts) < 2 || !(mean > 0) {
		return 0
	}
	sum := 0.0
	for _, p := range r.Parts {
		sum = math.Hypot(sum, usualShare*p.Volume*(partKappa(p.Substance, waterDensity)-mean))
	}
	return sum / mean
}

func (l *Ledger) coreInputs() []Input {
	c := l.full.dissolved.Core
	a := Input{AdsorptionA, c.A, usualAdsorption * c.A, commonPractice}
	b := Input{AdsorptionB, c.B, usualAdsorption / 2 * c.B, commonPractice}
	for _, p := range l.full.asked.Recipe.Parts {
		known := p.Substance.Adsorption
		if known == nil || l.full.asked.Recipe.Adsorption != solutes.KnownAdsorption {
			continue
		}
		if u := bounded(known.A); u > 0 {
			a.StandardUncertainty, a.Source = u, boundsSource
		}
		if u := bounded(known.B); u > 0 {
			b.StandardUncertainty, b.Source = u, boundsSource
		}
	}
	return []Input{a, b}
}
