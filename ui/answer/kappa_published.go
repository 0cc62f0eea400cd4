package answer

import (
	"errors"
	"fmt"
	"math"

	"dropcrest/koehler"
	"dropcrest/koehler/kappa"
	"dropcrest/ui/figure"
)

// PublishedRow is a published κ beside the measurements.
type PublishedRow struct {
	Kappa Number `json:"kappa"`
	WaterRow
	Points []ComparedRow `json:"points"`
}

// ComparedRow is what the published κ means at one measurement.
type ComparedRow struct {
	Name            string  `json:"name"`
	Recomputed      Number  `json:"kappa_recomputed"` // under the water of the measurement
	Dry             Number  `json:"dry_diameter_m"`   // that activates at the supersaturation of the measurement; volume-equivalent
	Classic         Number  `json:"dry_diameter_classic_m"`
	Supersaturation Number  `json:"critical_supersaturation_percent"` // of the dry diameter of the measurement
	Growth          Number  `json:"growth_factor"`                    // of that dry diameter at the humidity of the measurement
	Problem         *string `json:"problem"`
}

func (k *implied) isCompared() bool { return k.asked.PublishedKappa.Word == "" }

// published is the κ that the measurements are compared with, and its water.
func (k *implied) published() (float64, kappa.Convention) {
	return k.asked.PublishedKappa.Number, kappa.Convention{Temperature: k.asked.PublishedTemperature, Tension: k.asked.PublishedTension}
}

// compare sets the published κ beside one measurement, exactly: by the crest or the
// growth factor that it was computed from.
func (k *implied) compare(m *kappaPoint) ComparedRow {
	value, from := k.published()
	gap := Number(math.NaN())
	row := ComparedRow{m.name, gap, gap, gap, gap, gap, nil}
	given := kappa.Given{DryDiameter: m.volumeDiameter()}
	if m.isGrowth() {
		given.Humidity = m.Humidity.Value
	}
	r, err := kappa.Recompute(value, given, from, m.water)
	if err == nil {
		row.Recomputed = Number(r.Kappa)
		if m.isGrowth() {
			row.Growth = Number(r.GrowthFactor)
		} else {
			row.Supersaturation = percentNumber(r.Supersaturation)
			var size kappa.Size
			if size, err = kappa.DryDiameter(value, m.Supersaturation.Value, from); err == nil {
				row.Dry, row.Classic = Number(size.Diameter), Number(size.Classic)
			}
		}
	}
	if err != nil {
		problem := problemOf(err)
		row.Problem = &problem
	}
	return row
}

// problemOf is why there is no κ, or no size of one.
func problemOf(err error) string {
	var none *koehler.NoSolutionError
	if errors.As(err, &none) {
		return none.Reason
	}
	return reason(err)
}

func (k *implied) publishedRow() *PublishedRow {
	if !k.isCompared() {
		return nil
	}
	value, from := k.published()
	r := &PublishedRow{Number(value), waterRow(from), make([]ComparedRow, 0, len(k.points))}
	for i := range k.points {
		r.Points = append(r.Points, k.compare(&k.points[i]))
	}
	return r
}

// publishedWords say what the published κ means at a single measurement; of several
// the table has it.
func (k *implied) publishedWords() string {
	if !k.isCompared() || len(k.points) != 1 {
		return ""
	}
	m := &k.points[0]
	value, _ := k.published()
	r := k.compare(m)
	switch {
	case r.Problem != nil:
		return fmt.Sprintf("The published %s cannot be compared: %s.", shortest(value), *r.Problem)
	case m.isGrowth():
		return fmt.Sprintf("The published %s is %s here, a growth factor of %s.", shortest(value), digits3(float64(r.Recomputed)), digits(float64(r.Growth), 4))
	}
	return fmt.Sprintf("The published %s is %s here and activates from %s nm on.", shortest(value), digits3(float64(r.Recomputed)), digits(1e9*float64(r.Dry), 3))
}

func (k *implied) publishedTable() Table {
	t := Table{Key: "published", Title: "The published κ beside the measurements", Columns: []Column{
		{"name", "name"},
		{"kappa_recomputed", "κ recomputed"},
		{"dry_diameter_m", "dry diameter that activates, m"},
		{"dry_diameter_classic_m", "the same, classic, m"},
		{"critical_supersaturation_percent", "critical supersaturation, %"},
		{"growth_factor", "growth factor"},
		{"problem", "problem"},
	}}
	for _, r := range k.publishedRow().Points {
		t.Rows = append(t.Rows, []any{r.Name, cell(float64(r.Recomputed)), cell(float64(r.Dry)), cell(float64(r.Classic)),
			cell(float64(r.Supersaturation)), cell(float64(r.Growth)), textCell(r.Problem)})
	}
	return t
}

// publishedLine is the published κ in the picture.
func (k *implied) publishedLine(lo, hi float64) figure.Line {
	value, from := k.published()
	line := isoline(value, from.Kelvin(), lo, hi)
	line.Says, line.Dash = "published "+shortest(value), figure.Dashed
	return line
}
