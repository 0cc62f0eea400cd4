package ascent

import (
	"math"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/spectrum"
)

// Parcel is the air that rises.
type Parcel struct {
	Temperature float64 // K, at the start
	Pressure    float64 // Pa, at the start
	Humidity    float64 // saturation ratio at the start, up to 1; 0: 0.95
	Updraft     float64 // m/s
	Population  []Group
}

// Group is particles of one size distribution and one composition, such as a mode.
type Group struct {
	Sizes spectrum.Sizes // numbers in 1/m³ of the air at the start
	Share float64        // of the particles of Sizes, above 0; 0: all
	Kappa float64        // 0 to 30; 0: stays dry, counted but not grown

	// KappaBySize is κ at each dry size in place of Kappa.
	KappaBySize *aerosol.Table
	// Matter is any particle in place of Kappa whose curve is smooth; its DryDiameter
	// and Temperature do not matter. Where its volumes are not additive the growth
	// law takes the additive size; the equilibrium is the true one.
	Matter *koehler.Particle
	// TensionFactor is the surface tension over that of water where there is no
	// Matter; 0: 1.
	TensionFactor float64
	// From and To are the dry diameters (m) between which the bins lie; 0: 4.5
	// geometric standard deviations from the median of a mode, but not below 2 nm nor
	// above 20 µm, the limits of measured bins, the matching quantiles of anything
	// else. What lies outside takes no part.
	From, To float64
}

// Transition names how growth goes over from the continuum to free molecules.
type Transition int

const (
	FuchsSutugin Transition = iota // Fuchs & Sutugin 1970, λ_v = 3 D_v/c̄
	FluxMatching                   // fluxes matched at the surface, as in Pruppacher & Klett without the jump length (from memory)
	Continuum                      // no correction
)

// String returns the word that scripts see.
func (t Transition) String() string {
	switch t {
	case FuchsSutugin:
		return "fuchs-sutugin"
	case FluxMatching:
		return "flux-matching"
	case Continuum:
		return "continuum"
	}
	return "unknown"
}

// Options says how an ascent is computed. The zero value is ready.
type Options struct {
	Bins                 int        // of each group; 0: 200
	Tolerance            float64    // relative, of radii and of the peak; 0: 1e-5. 1e-4 is not safe
	MassAccommodation    float64    // above 0, up to 1; 0: 1
	ThermalAccommodation float64    // above 0, up to 1; 0: 0.96
	Transition           Transition // zero: FuchsSutugin
	MoistHeat            bool       // the heat capacities of vapour and liquid kept; otherwise that of dry air alone
	Height               float64    // m above the start, where the ascent ends; 0: 300
	StopAtPeak           bool       // end soon after the peak; Height is the farthest
	ProfileRows          int        // heights of Result.Profile, the ends included; 0: none
	Follow               []Tracer   // dry sizes whose wet radii the profile has
	Probes               int        // of each group, in a second run that narrows the grown size down; 0: none
	Sizes                bool       // whether Result.Drops is filled
	// Progress is called now and then with the height reached and the last one.
	Progress func(height, last float64)
}

// Tracer is one dry particle that is followed without counting for anything.
type Tracer struct {
	Group       int // of the population, from 0
	DryDiameter float64
}

const (
	defaultBins      = 200
	defaultTolerance = 1e-5
	defaultThermal   = 0.96
	defaultHeight    = 300
	defaultHumidity  = 0.95
	mostBins         = 100000
	mostHeight       = 20000
	coldest, warmest = 200, 340 // K
)

func orDefault(x *float64, value float64) {
	if *x == 0 {
		*x = value
	}
}

// completed returns the parcel and options with their defaults, or what is wrong.
func completed(p Parcel, o Options) (Parcel, Options, error) {
	orDefault(&p.Humidity, defaultHumidity)
	orDefault(&o.Tolerance, defaultTolerance)
	orDefault(&o.MassAccommodation, 1)
	orDefault(&o.ThermalAccommodation, defaultThermal)
	orDefault(&o.Height, defaultHeight)
	if o.Bins == 0 {
		o.Bins = defaultBins
	}
	if err := p.check(); err != nil {
		return p, o, err
	}
	return p, o, o.check(len(p.Population))
}

func (p Parcel) check() error {
	vapour := p.Humidity * atmos.VapourPressure(p.Temperature)
	switch {
	case !(p.Temperature >= coldest && p.Temperature <= warmest):
		return unusable("temperature", -1, p.Temperature, "200 to 340 K")
	case !(p.Humidity > 0 && p.Humidity <= 1):
		return unusable("start humidity", -1, p.Humidity, "above 0 and up to 1 (a saturation ratio)")
	case !(p.Pressure > 2*vapour) || math.IsInf(p.Pressure, 1):
		return unusable("pressure", -1, p.Pressure, "more than twice the pressure of the vapour, in Pa")
	case !(p.Updraft > 0) || p.Updraft > 100:
		return unusable("updraft", -1, p.Updraft, "above 0 and up to 100 m/s")
	}
	return nil
}

func (o Options) check(groups int) error {
	isShare := func(x float64) bool { return x > 0 && x <= 1 }
	switch {
	case o.Bins < 1 || o.Bins > mostBins:
		return unusable("bins", -1, float64(o.Bins), "1 to 100000")
	case !(o.Tolerance >= 1e-12 && o.Tolerance <= 1e-2):
		return unusable("tolerance", -1, o.Tolerance, "1e-12 to 0.01")
	case !isShare(o.MassAccommodation):
		return unusable("mass accommodation", -1, o.MassAccommodation, "above 0 and up to 1")
	case !isShare(o.ThermalAccommodation):
		return unusable("thermal accommodation", -1, o.ThermalAccommodation, "above 0 and up to 1")
	case o.Transition < FuchsSutugin || o.Transition > Continuum:
		return unusable("transition", -1, float64(o.Transition), "one of the named forms")
	case !(o.Height > 0 && o.Height <= mostHeight):
		return unusable("height", -1, o.Height, "above 0 and up to 20000 m")
	case o.ProfileRows < 0 || o.ProfileRows == 1 || o.ProfileRows > mostBins:
		return unusable("profile rows", -1, float64(o.ProfileRows), "0, or 2 and more")
	case o.Probes < 0 || o.Probes > mostBins:
		return unusable("probes", -1, float64(o.Probes), "0 or more")
	}
	for i, t := range o.Follow {
		if t.Group < 0 || t.Group >= groups {
			return unusable("group of followed size", i, float64(t.Group), "one of the population, from 0")
		}
		if !(t.DryDiameter > 0) || math.IsInf(t.DryDiameter, 1) {
			return unusable("followed dry diameter", i, t.DryDiameter, "above 0, in m")
		}
	}
	return nil
}
