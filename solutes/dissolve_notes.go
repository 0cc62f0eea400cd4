package solutes

import (
	"fmt"
	"math"
	"strings"
)

// sameTemperature is how near to 25 °C values of 25 °C need no note, K.
const sameTemperature = 0.5

// away reports whether values of 25 °C need a note at T.
func away(T float64) bool { return math.Abs(T-referenceTemperature) > sameTemperature }

// ionNotes say what ion interaction of salts leaves out at the temperature.
func (d *dissolving) ionNotes(salts []Substance) {
	var fixed, joined, held []string
	for _, s := range salts {
		switch t := s.Ion.Temperature; {
		case t == nil:
			fixed = append(fixed, s.called())
		case d.Temperature < t.Low || d.Temperature > t.High:
			held = append(held, s.called())
		}
		if s.Concentrated.Joined() || s.Ion.Extended != nil {
			joined = append(joined, s.called())
		}
	}
	if len(fixed) > 0 && away(d.Temperature) {
		d.note("ion-parameters-25c", inputTemperature,
			"Ion-interaction parameters of %s are those of 25 °C; only the Debye-Hückel slope follows the temperature.",
			strings.Join(fixed, ", "))
	}
	if len(held) > 0 {
		d.note("ion-parameters-held", inputTemperature,
			"The temperature is outside the range of the ion-interaction parameters of %s: those of the nearer end are held.",
			strings.Join(held, ", "))
	}
	if len(joined) > 0 && away(d.Temperature) {
		d.note("concentrated-25c", inputTemperature,
			"Concentrated solutions of %s follow data of 25 °C.", strings.Join(joined, ", "))
	}
	if len(salts) > 0 {
		d.addOnce(debyeHueckelNotes(d.Temperature))
	}
}

// mixingNotes say what the rule for mixtures leaves out.
func (d *dissolving) mixingNotes(salts, own []Substance) {
	charges := map[string]bool{}
	for _, s := range salts {
		charges[fmt.Sprint(s.Ion.CationCharge, "-", s.Ion.AnionCharge)] = true
	}
	if len(charges) > 1 {
		d.note("zsr-mixed-charge", inputComponent,
			"Salts of different charge type are mixed by water content (ZSR): 0.4 to 1 %% low in water at 0.03 to 0.3 osmol/kg, about 0.2 to 0.5 %% in critical supersaturation.")
	}
	for _, s := range own {
		if isBisulfate(s) && len(salts)+len(own) > 1 {
			d.note("zsr-bisulfate", inputComponent,
				"%s is mixed with other solutes by water content (ZSR), each with its own dissociation: sulfuric acid with as many mol of ammonium sulfate comes out 1 to 6 %% high in water, up to 2 %% low in critical supersaturation.", s.called())
		}
	}
}
