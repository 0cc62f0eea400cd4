package scenario

import "slices"

// filmList is the surface activity of the organics.
var filmList = list[Film]{
	key: "szyszkowski", says: "surface-active film",
	help: "The surface activity of the organics by Szyszkowski and Langmuir: gamma-max= (mol a surface when it is full), k= (how readily the surface " +
		"fills), floor= (the least surface tension, if there is one), as in \"gamma-max=3e-6mol/m2 k=20m3/mol floor=30mN/m\".",
	rows: func(s *Scenario) *[]Film { return &s.Szyszkowski },
	fields: []field[Film]{
		{key: "gamma-max", says: "full surface", quantity: filmExcess,
			help:   "How much of the organic a full surface holds.",
			origin: "an example: published values of single acids are few",
			at:     func(f *Film) any { return &f.GammaMax }},
		{key: "k", says: "affinity", quantity: filmAffinity,
			help:   "The constant of Langmuir's isotherm: the surface is half full at the concentration 1/k.",
			origin: "an example: published values of single acids are few",
			at:     func(f *Film) any { return &f.K }},
		{key: "floor", says: "least surface tension", quantity: filmFloor,
			help:   "The surface tension below which the film does not go. 0 stands for none.",
			origin: "no floor",
			at:     func(f *Film) any { return &f.Floor }},
	},
	standard: func() Film { return Film{GammaMax: 3e-6, K: 20} },
	required: []string{"gamma-max", "k"},
	most:     1,
	show: func(s *Scenario) string {
		if len(s.Szyszkowski) == 0 {
			return "none"
		}
		f := s.Szyszkowski[0]
		text := filmExcess.show(f.GammaMax) + ", " + filmAffinity.show(f.K)
		if f.Floor > 0 {
			text += ", floor " + filmFloor.show(f.Floor)
		}
		return text
	},
}

// isothermList is the adsorption of water on insoluble matter.
var isothermList = list[Isotherm]{
	key: "adsorption", says: "adsorption",
	help: "How water adsorbs on insoluble matter, by the isotherm of Frenkel, Halsey and Hill: A=, B=, and form= for the term of a soluble share, as in " +
		"\"A=2.25 B=1.20\". Left out, the values of the catalogue count; A=0 B=1 takes adsorption away.",
	rows: func(s *Scenario) *[]Isotherm { return &s.Adsorption },
	fields: []field[Isotherm]{
		{key: "A", says: "A", quantity: isothermA,
			help:   "How strongly the first layer of water is held. 0 takes adsorption away.",
			origin: "a common value for mineral dust",
			at:     func(i *Isotherm) any { return &i.A }},
		{key: "B", says: "B", quantity: isothermB,
			help:   "How fast the hold falls with every layer.",
			origin: "a common value for mineral dust",
			at:     func(i *Isotherm) any { return &i.B }},
		{key: "form", says: "form of the soluble term", words: []Option{{"kappa", "kappa"}, {"exponential", "exponential"}},
			help: "How a soluble share on the particle enters: by the water activity of kappa, or by its first order, an exponential that stays finite at the " +
				"dry size. Both are published (Kumar et al. 2011); they differ near the dry size.",
			origin: "the kappa form is that of all other particles",
			at:     func(i *Isotherm) any { return &i.Form }},
	},
	standard: func() Isotherm { return Isotherm{2.25, 1.2, "kappa"} },
	required: []string{"A", "B"},
	most:     1,
	show: func(s *Scenario) string {
		switch {
		case len(s.Adsorption) == 0:
			return "of the catalogue"
		case s.Adsorption[0].A == 0:
			return "none"
		}
		text := "A " + isothermA.show(s.Adsorption[0].A) + ", B " + isothermB.show(s.Adsorption[0].B)
		if s.Adsorption[0].Form == "exponential" {
			text += ", exponential"
		}
		return text
	},
}

// Adsorbs reports whether the adsorption of water on insoluble matter concerns the
// particle: an isotherm is given, or the catalogue has one for one of its parts.
func (s Scenario) Adsorbs() bool {
	return len(s.Adsorption) > 0 || slices.ContainsFunc(s.Components, func(c Component) bool {
		found, ok := s.catalogue().Find(c.Substance)
		return ok && found.Insoluble() && found.Adsorption != nil
	})
}
