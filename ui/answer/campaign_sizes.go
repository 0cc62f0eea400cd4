package answer

import (
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// sizing is what stands between sizes as an instrument gives them and those of the
// dry particles in the air.
type sizing struct {
	seen     aerosol.Response // share of particles that are counted; nil: all
	toVolume func(d float64) float64
}

// sizingOf is the sizing of a scenario. A classifier measures at laboratory
// pressure and 23 °C, as charges are computed.
func sizingOf(env Env, s scenario.Scenario) (sizing, error) {
	var z sizing
	if s.DrySizeIs == "mobility" {
		const laboratory = 296.15 // K
		z.toVolume = func(d float64) float64 {
			return atmos.VolumeEquivalent(d, s.ShapeFactor, laboratory, atmos.StandardPressure)
		}
	}
	if s.Penetration == "" {
		return z, nil
	}
	if x, err := strconv.ParseFloat(s.Penetration, 64); err == nil {
		if !(x > 0 && x <= 1) {
			return z, &InputError{Input: "penetration", Text: fmt.Sprintf("a share of %s: want more than 0 and at most 1", s.Penetration)}
		}
		z.seen = aerosol.Constant(x)
		return z, nil
	}
	table, err := readPenetration(env, s.Penetration)
	if err != nil {
		return z, &InputError{Input: "penetration", Text: err.Error()}
	}
	z.seen = table
	return z, nil
}

// readPenetration reads two columns: diameter in nm, share. A first line without
// numbers is a heading.
func readPenetration(env Env, name string) (*aerosol.Table, error) {
	in, err := openFile(env, name, false)
	if err != nil {
		return nil, err
	}
	defer in.Close()
	r := csv.NewReader(in)
	r.FieldsPerRecord, r.TrimLeadingSpace = 2, true
	var diameters, shares []float64
	for {
		row, err := r.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return nil, fmt.Errorf("%s: %s: want two columns, diameter in nm and share", name, plain.Clean(err.Error()))
		}
		line, column := r.FieldPos(0)
		d, badSize := strconv.ParseFloat(strings.TrimSpace(row[0]), 64)
		share, badShare := strconv.ParseFloat(strings.TrimSpace(row[1]), 64)
		if badSize != nil || badShare != nil {
			if len(diameters) == 0 && line == 1 {
				continue
			}
			return nil, fmt.Errorf("%s:%d:%d: no number: want diameter in nm and share", name, line, column)
		}
		if !(share > 0 && share <= 1) {
			return nil, fmt.Errorf("%s:%d: a share of %g: want more than 0 and at most 1", name, line, share)
		}
		diameters, shares = append(diameters, d*1e-9), append(shares, share)
	}
	table, err := aerosol.NewTable(diameters, shares)
	if err != nil {
		return nil, fmt.Errorf("%s: %s", name, reason(err))
	}
	return table, nil
}

// apply brings the sizes of an instrument to dry particles in the air.
func (z sizing) apply(b *aerosol.Bins) (*aerosol.Bins, error) {
	var err error
	if z.seen != nil {
		if b, err = b.Corrected(z.seen); err != nil {
			return nil, err
		}
	}
	if z.toVolume != nil {
		return b.Resized(z.toVolume)
	}
	return b, nil
}
