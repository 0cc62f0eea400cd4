package verify

import (
	"strings"
	"testing"
)

// A row that asks for what is not there says so at its place.
func TestAcidsRefuse(t *testing.T) {
	for _, c := range []struct{ name, check, args, says string }{
		{"no such substance", "own-model-osmotic-coefficient", "substance=phlogiston m=1", "phlogiston"},
		{"no own model", "own-model-osmotic-coefficient", "substance=sodium chloride m=1", "no water activity model"},
		{"out of range", "own-model-osmotic-coefficient", "substance=sea salt m=50", "range"},
		{"molality 0", "own-model-osmotic-coefficient", "substance=sea salt m=0", "range"},
		{"impossible temperature", "own-model-growth-kappa", "substance=sulfuric acid aw=0.9 T=20", "temperature"},
		{"no solubility", "own-model-saturated-humidity", "substance=sulfuric acid", "solubility"},
		{"salinity in g/kg", "sea-water-activity", "salinity=35.165", "salinity"},
	} {
		row := c.check + "," + c.args + ",q,c,1,0.1,1,s,read,\n"
		_, err := Run(folder(head+row), Options{})
		if err == nil || !strings.Contains(err.Error(), c.says) {
			t.Errorf("%s: error %v, should say %q", c.name, err, c.says)
		}
	}
}
