package solutes

// OwnModel returns the solution of a substance that has a water activity model
// of its own beside the single-salt ion interaction: sulfuric acid, the
// bisulfates, sea salt, sucrose, glucose, citric acid (by Key). says names the
// model in words and notes what it leaves out; ok is false for all other
// substances. Errors are of type *UnusableError.
func OwnModel(s Substance, T float64) (o *OsmoticSolution, says string, notes []string, ok bool, err error) {
	switch s.Key {
	case "sulfuric_acid":
		says = "ion interaction with bisulfate dissociation (Pitzer, Roy & Silvester 1977), then Tabazadeh et al. 1997"
		notes = []string{BisulfateNote, TabazadehNote}
		o, err = NewSulfuricAcid(s, T)
	case "ammonium_bisulfate", "letovicite":
		says = "ion interaction with bisulfate dissociation (Pitzer, Roy & Silvester 1977), then Tang & Munkelwitz 1994"
		notes = []string{BisulfateNote, BorrowedBisulfateNote}
		o, err = NewBisulfate(s, T)
	case "sodium_bisulfate":
		says = "ion interaction with bisulfate dissociation (Pitzer, Roy & Silvester 1977), then Tang & Munkelwitz 1994"
		notes = []string{BisulfateNote, SodiumBisulfateNote}
		o, err = NewBisulfate(s, T)
	case "sea_salt":
		says = "ion mixture of the reference composition (Harvie, Moller & Weare 1984; Millero et al. 2008)"
		notes = []string{SeaSaltNote}
		o, err = NewSeaSalt(s, T)
	case "sucrose":
		says = "osmotic coefficients of Robinson & Stokes 1961, then Norrish 1966"
		notes = []string{NonelectrolyteNote}
		o, err = NewNonelectrolyte(s, T)
	case "glucose", "citric_acid":
		says = "ideal solution, then Norrish 1966 (Chirife et al. 1980)"
		notes = []string{NonelectrolyteNote}
		o, err = NewNonelectrolyte(s, T)
	default:
		return nil, "", nil, false, nil
	}
	return o, says, notes, true, err
}
