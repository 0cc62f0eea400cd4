package answer

import (
	"slices"
	"strconv"
	"sync"

	"dropcrest/ui/scenario"
)

// ledgerGroups are the inputs of the Ledger question: its own, and those of the
// questions that it takes apart.
var ledgerGroups = sync.OnceValue(func() []Group {
	groups := []Group{
		{"The ledger", []string{"of", "particle-outcome", "at-supersaturation", "ascent-outcome", "row", "reach"}},
		{"How sure it is", []string{"uncertainty", "temperature-uncertainty", "surface-tension-uncertainty", "shape-factor-uncertainty", "trials", "seed", "coverage"}},
	}
	there := map[string]scenario.Path{}
	for _, of := range [][]Group{curveGroups, spectrumGroups, ascentGroups} {
		for _, g := range of {
			var keys []string
			for option, path := range g.Options() {
				if other, taken := there[option]; taken && other != path {
					option = string(path) // such as bins, a file on one page and a number on another
				}
				if _, taken := there[option]; taken {
					continue
				}
				there[option] = path
				keys = append(keys, option+"="+string(path))
			}
			switch at := slices.IndexFunc(groups, func(h Group) bool { return h.Title == g.Title }); {
			case len(keys) == 0:
			case at >= 0:
				groups[at].Keys = append(groups[at].Keys, keys...)
			default:
				groups = append(groups, Group{g.Title, keys})
			}
		}
	}
	return groups
})

// leftOutOfLedger only concerns pictures, tables, or many answers at once. The options
// are there, so that a command line of a page serves its ledger; a note says that they
// do not count.
var leftOutOfLedger = map[scenario.Path]bool{"points": true, "from-radius": true, "to-radius": true, "fit": true, "axes": true, "follow": true,
	"sweep": true, "cases": true, "part": true, "supersaturation": true, "humidity-history": true, "refinement": true}

// ledgerMeans tells a number of bins from a file of them: the pages have the same
// option for both.
func ledgerMeans(option, text string) (scenario.Path, bool) {
	_, err := strconv.Atoi(text)
	return "ascent-bins", option == "bins" && err == nil
}

// ledgerHeeds are the inputs that count, by the answer that is taken apart: those of
// its question, and the ledger's own.
var ledgerHeeds = sync.OnceValue(func() map[string]map[scenario.Path]bool {
	heeds := map[string]map[scenario.Path]bool{}
	for of, groups := range map[string][]Group{scenario.LedgerOfCurve: curveGroups, scenario.LedgerOfSpectrum: spectrumGroups, scenario.LedgerOfAscent: ascentGroups} {
		heeds[of] = map[scenario.Path]bool{}
		for _, g := range slices.Concat(ledgerGroups()[:2], groups) {
			for _, path := range g.Options() {
				heeds[of][path] = !leftOutOfLedger[path]
			}
		}
	}
	return heeds
})

// ledgerCounts tells whether an input counts.
func ledgerCounts(s scenario.Scenario, path scenario.Path) bool {
	return ledgerHeeds()[s.LedgerOf][path]
}
