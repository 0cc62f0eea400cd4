package ascent

import (
	"errors"
	"math"
	"testing"

	"dropcrest/atmos/aerosol"
	"dropcrest/koehler"
	"dropcrest/koehler/spectrum"
	"dropcrest/solutes"
)

func TestFromSpectrum(t *testing.T) {
	mode := aerosol.Mode{Concentration: 800e6, Median: 80e-9, GSD: 1.7}
	table, err := spectrum.NewKappaTable([]float64{1e-8, 1e-6}, []float64{0.1, 0.5}, 2e-9)
	if err != nil {
		t.Fatal(err)
	}
	p := spectrum.Population{
		{Sizes: mode, Share: 1, Of: spectrum.Kappa{Value: 0.4, KelvinLength: 2e-9}},
		{Sizes: mode, Share: 0.5, Of: spectrum.External{{Share: 0.7, Of: spectrum.Kappa{Value: 0.1}}, {Share: 0.3, Of: table}}},
		{Sizes: mode, Share: 1, Of: spectrum.Spread{Median: 0.3, GSD: 1.5, KelvinLength: 2e-9}},
		{Sizes: mode, Share: 1, Of: &spectrum.Matter{Particle: koehler.Particle{Solution: solutes.Kappa(0.2)}}},
	}
	groups, partOf, err := FromSpectrum(p)
	if err != nil {
		t.Fatal(err)
	}
	number, lnKappa := 0.0, 0.0
	for i, g := range groups {
		number += g.Share * g.Sizes.Number()
		if partOf[i] == 2 {
			lnKappa += g.Share * math.Log(g.Kappa)
		}
	}
	near(t, "number", number, p.Number(), 1e-12)
	near(t, "median of the spread", math.Exp(lnKappa), 0.3, 1e-12)
	if len(groups) != 1+2+spreadClasses+1 || partOf[1] != 1 || partOf[2] != 1 || groups[1].Share != 0.35 || groups[2].KappaBySize == nil {
		t.Errorf("%d groups, of %v", len(groups), partOf)
	}
	mustRun(t, Parcel{Temperature: 283.15, Pressure: 90000, Updraft: 1, Population: groups}, Options{Bins: 20})
	ranges, err := spectrum.NewRanges([]float64{1e-7}, []spectrum.Composition{spectrum.Kappa{Value: 0.1}, spectrum.Kappa{Value: 0.5}})
	if err != nil {
		t.Fatal(err)
	}
	var which *GroupError
	if _, _, err := FromSpectrum(append(p, spectrum.Group{Sizes: mode, Share: 1, Of: ranges})); !errors.As(err, &which) || which.Group != 4 {
		t.Errorf("ranges: %v", err)
	}
}
