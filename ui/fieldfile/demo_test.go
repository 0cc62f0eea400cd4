package fieldfile

import (
	"bytes"
	"fmt"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"gonum.org/v1/gonum/stat/distuv"

	"dropcrest/atmos"
	"dropcrest/koehler"
)

// The demo station is invented, and so is every number in its files. The truth
// behind them is in truth.csv and in the functions below.
const (
	demoStation = "Dropcrest demo station (invented)"
	demoDir     = "../../testdata/demo"
	demoKelvin  = 298.15 // K, of the counter; surface tension of pure water there
)

var (
	demoBegin  = time.Date(2026, 3, 14, 0, 0, 0, 0, time.UTC)
	demoLevels = []float64{0.1, 0.2, 0.4, 0.6, 1.0} // % supersaturation
)

const demoDays = 2

// truth is what the invented air is like at one time. Concentrations are at
// 273.15 K and 1013.25 hPa.
type truth struct {
	n, dg, gsd [2]float64 // cm⁻³, nm
	organic    float64    // volume share
	kappa      float64
}

// Volume shares that stay, κ and density (g/cm³) of the parts: the table of the
// closure scheme (common practice).
const (
	demoSoot, demoNitrate                    = 0.05, 0.15
	kappaSulfate, kappaNitrate, kappaOrganic = 0.61, 0.67, 0.10
	rhoSulfate, rhoNitrate, rhoOrganic       = 1.769, 1.720, 1.400
	rhoSoot                                  = 1.700
	molarSulfate, molarNitrateSalt           = 132.14, 80.04
	molarSO4, molarNO3, molarNH4             = 96.06, 62.00, 18.04
)

func truthAt(t time.Time) truth {
	h := t.Sub(demoBegin).Hours()
	daily := func(phase float64) float64 { return math.Sin(2 * math.Pi * (h - phase) / 24) }
	drift := h / 48
	tr := truth{
		n:       [2]float64{900 + 350*daily(7), 600 + 180*daily(1) + 150*drift},
		dg:      [2]float64{42 + 7*daily(9), 135 + 18*daily(3) - 10*drift},
		gsd:     [2]float64{1.65, 1.5},
		organic: 0.45 + 0.15*daily(8),
	}
	sulfate := 1 - tr.organic - demoSoot - demoNitrate
	tr.kappa = kappaOrganic*tr.organic + kappaNitrate*demoNitrate + kappaSulfate*sulfate
	return tr
}

// above is the number of particles larger than a diameter in nm.
func (tr truth) above(d float64) float64 {
	sum := 0.0
	for i := range tr.n {
		sum += tr.n[i] / 2 * math.Erfc(math.Log(d/tr.dg[i])/(math.Sqrt2*math.Log(tr.gsd[i])))
	}
	return sum
}

// ccn is the number of cloud condensation nuclei at a supersaturation in %.
func (tr truth) ccn(percent float64) float64 {
	kelvin := koehler.KelvinLength(atmos.SurfaceTension(demoKelvin), demoKelvin)
	d, err := koehler.DryOf(tr.kappa, kelvin, percent/100)
	if err != nil {
		panic(err) // the invented numbers are in range
	}
	return tr.above(d * 1e9)
}

// volume of the particles in µm³/cm³.
func (tr truth) volume() float64 {
	sum := 0.0
	for i := range tr.n {
		l := math.Log(tr.gsd[i])
		sum += tr.n[i] * math.Pi / 6 * math.Pow(tr.dg[i]*1e-3, 3) * math.Exp(4.5*l*l)
	}
	return sum
}

// demo writes the files; one source of randomness, so that a file changes only
// with what was written before it.
type demo struct{ src rand.Source }

func (d demo) poisson(mean float64) float64 {
	if mean <= 0 {
		return 0
	}
	return distuv.Poisson{Lambda: mean, Src: d.src}.Rand()
}

func (d demo) normal(sigma float64) float64 { return distuv.Normal{Sigma: sigma, Src: d.src}.Rand() }

func during(t time.Time, from, to string) bool {
	a, _ := time.Parse("01-02 15:04", from)
	b, _ := time.Parse("01-02 15:04", to)
	a, b = a.AddDate(2026, 0, 0), b.AddDate(2026, 0, 0)
	return !t.Before(a) && t.Before(b)
}

const (
	demoBins          = 40
	demoLow, demoHigh = 12.0, 750.0 // nm, the limits of the sizes
	scanEvery         = 10 * time.Minute
	binVolume         = 8.0 // cm³ counted in a bin of one scan
)

func binLimit(i int) float64 { return demoLow * math.Pow(demoHigh/demoLow, float64(i)/demoBins) }

// sizes is the NASA Ames file with the flags of EBAS.
func (d demo) sizes() []byte {
	var head []string
	for i := range demoBins {
		low, high := binLimit(i), binLimit(i+1)
		head = append(head, fmt.Sprintf("particle_number_size_distribution, 1/cm3, D=%.2f nm, Statistics=arithmetic mean", math.Sqrt(low*high)))
	}
	names := []string{"start_time", "end_time"}
	for i := range demoBins {
		names = append(names, fmt.Sprintf("dn%02d", i+1))
	}
	names = append(names, "flag")
	comments := []string{
		"Data definition:              EBAS_1.1", "Set type code:                TU", "Timezone:                     UTC",
		"Startdate:                    20260314000000", "Timeref:                      00_00", "Resolution code:              10mn",
		"Station name:                 " + demoStation, "Component:                    particle_number_size_distribution",
		"Unit:                         1/cm3", "Matrix:                       aerosol", "Data level:                   2",
		"Volume std. temperature:      273.15 K", "Volume std. pressure:         1013.25 hPa",
		"Comment:                      all numbers are invented; dN/dlog10 D of two lognormal modes with counting noise",
		strings.Join(names, " "),
	}
	nv := demoBins + 2
	lines := []string{"", "Nobody, Really", "Dropcrest, no institution", "Mobility size spectrometer (invented)", "Demo", "1 1",
		"2026 03 14 2026 05 02", "0.006944", "Days from the file reference point (start_time)", fmt.Sprint(nv),
		strings.TrimSpace(strings.Repeat("1 ", nv)),
		"9999.999999 " + strings.Repeat("99999.9 ", demoBins) + "9.999",
		"end_time of measurement, days from the file reference point"}
	lines = append(append(lines, head...), "numflag, no unit", "0", fmt.Sprint(len(comments)))
	lines = append(lines, comments...)
	lines[0] = fmt.Sprintf("%d 1001", len(lines))
	var b bytes.Buffer
	b.WriteString(strings.Join(lines, "\n") + "\n")
	for t := demoBegin; t.Before(demoBegin.AddDate(0, 0, demoDays)); t = t.Add(scanEvery) {
		d.scan(&b, t)
	}
	return b.Bytes()
}

func (d demo) scan(b *bytes.Buffer, t time.Time) {
	since := func(t time.Time) float64 { return t.Sub(demoBegin).Hours() / 24 }
	flag, factor := "0.000", 1.0
	switch {
	case during(t, "03-15 10:00", "03-15 10:40"):
		flag, factor = "0.460", 5 // contamination: to be left out
	case during(t, "03-14 20:00", "03-14 21:00"):
		flag = "0.559" // local influence, but valid
	case during(t, "03-14 05:00", "03-14 05:30"):
		flag = "0.999"
	}
	fmt.Fprintf(b, "%.6f %.6f", since(t), since(t.Add(scanEvery)))
	tr := truthAt(t.Add(scanEvery / 2))
	width := math.Log10(demoHigh/demoLow) / demoBins
	for i := range demoBins {
		n := tr.above(binLimit(i)) - tr.above(binLimit(i+1))
		counted := d.poisson(n * binVolume * factor)
		if flag == "0.999" {
			b.WriteString(" 99999.9")
		} else {
			fmt.Fprintf(b, " %.1f", counted/binVolume/width)
		}
	}
	b.WriteString(" " + flag + "\n")
}

const (
	ccnEvery  = 30 * time.Minute
	ccnVolume = 150.0 // cm³: 3 minutes at 50 cm³/min
)

// ccn is the ICARTT file, one column a supersaturation.
func (d demo) ccn() []byte {
	names := []string{"Time_Start", "Time_Stop"}
	lines := []string{"", "Nobody, Really", "Dropcrest, no institution", "CCN counter (invented)", "Demo", "1, 1", "2026, 03, 14, 2026, 05, 02",
		"1800", "Time_Start, seconds, Time_Start, start of the cycle", fmt.Sprint(1 + 2*len(demoLevels)),
		strings.TrimSuffix(strings.Repeat("1, ", 1+2*len(demoLevels)), ", "),
		strings.TrimSuffix(strings.Repeat("-9999, ", 1+2*len(demoLevels)), ", "),
		"Time_Stop, seconds, Time_Stop, end of the cycle"}
	for _, s := range demoLevels {
		key := strings.Replace(fmt.Sprintf("%.2f", s), ".", "p", 1)
		names = append(names, "CCN_"+key, "CCN_unc_"+key)
		lines = append(lines,
			fmt.Sprintf("CCN_%s, cm-3, CCN, cloud condensation nuclei at %.2f %% supersaturation as calibrated, at STP (273.15 K, 1013.25 hPa)", key, s),
			fmt.Sprintf("CCN_unc_%s, cm-3, CCN_uncertainty, standard uncertainty from counting at %.2f %% supersaturation, at STP", key, s))
	}
	normal := []string{"PI_CONTACT_INFO: nobody@example.org", "PLATFORM: " + demoStation, "LOCATION: nowhere", "ASSOCIATED_DATA: N/A",
		"INSTRUMENT_INFO: an invented counter, column at 298.15 K, 3 minutes counted at each supersaturation, 50 cm3/min",
		"DATA_INFO: all numbers are invented", "UNCERTAINTY: see the columns CCN_unc", "ULOD_FLAG: -7777", "ULOD_VALUE: N/A",
		"LLOD_FLAG: -8888", "LLOD_VALUE: 1.0", "DM_CONTACT_INFO: N/A", "PROJECT_INFO: N/A",
		"STIPULATIONS_ON_USE: none, the data are invented", "OTHER_COMMENTS: N/A", "REVISION: R0", "R0: the only revision", strings.Join(names, ", ")}
	lines = append(lines, "0", fmt.Sprint(len(normal)))
	lines = append(lines, normal...)
	lines[0] = fmt.Sprintf("%d, 1001, V02_2016", len(lines))
	var b bytes.Buffer
	b.WriteString(strings.Join(lines, "\n") + "\n")
	for t := demoBegin; t.Before(demoBegin.AddDate(0, 0, demoDays)); t = t.Add(ccnEvery) {
		from := t.Sub(demoBegin).Seconds()
		fmt.Fprintf(&b, "%.0f, %.0f", from, from+ccnEvery.Seconds())
		tr := truthAt(t.Add(ccnEvery / 2))
		for i, s := range demoLevels {
			n := d.poisson(tr.ccn(s) * ccnVolume)
			switch {
			case during(t, "03-14 12:00", "03-14 13:00"):
				b.WriteString(", -9999, -9999") // calibration
			case i == 0 && during(t, "03-15 03:00", "03-15 03:30"):
				b.WriteString(", -8888, -9999") // below the limit of detection
			default:
				fmt.Fprintf(&b, ", %.1f, %.2f", n/ccnVolume, math.Sqrt(n)/ccnVolume)
			}
		}
		b.WriteString("\n")
	}
	return b.Bytes()
}

const (
	stationEvery = 5 * time.Minute
	cnVolume     = 5000.0 // cm³: 5 minutes at 1 L/min
	massNoise    = 0.03   // relative, one standard deviation
)

// station is the CSV file: all particles, composition, temperature, pressure.
func (d demo) station() []byte {
	var b bytes.Buffer
	b.WriteString("start_time,end_time,cn at STP (cm-3),temperature (C),pressure (hPa),relative humidity (%)," +
		"organic (ug/m3),sulfate (ug/m3),nitrate (ug/m3),ammonium (ug/m3),black carbon (ug/m3),remark\r\n")
	for t := demoBegin; t.Before(demoBegin.AddDate(0, 0, demoDays)); t = t.Add(stationEvery) {
		tr := truthAt(t.Add(stationEvery / 2))
		h := t.Sub(demoBegin).Hours()
		v := tr.volume()
		sulfate := v * (1 - tr.organic - demoSoot - demoNitrate) * rhoSulfate
		nitrate := v * demoNitrate * rhoNitrate
		noisy := func(x float64) float64 { return x * (1 + d.normal(massNoise)) }
		cn := d.poisson((tr.n[0]+tr.n[1])*cnVolume) / cnVolume
		temperature, pressure := 9+4*math.Sin(2*math.Pi*(h-9)/24)+d.normal(0.1), 948+3*math.Sin(2*math.Pi*h/40)
		fmt.Fprintf(&b, "%s,%s,%.1f,%.1f,%.1f,%.0f", t.Format(time.RFC3339), t.Add(stationEvery).Format(time.RFC3339), cn, temperature, pressure,
			65-20*math.Sin(2*math.Pi*(h-9)/24))
		fmt.Fprintf(&b, ",%.3f,%.3f,%.3f,%.3f", noisy(v*tr.organic*rhoOrganic), noisy(sulfate*molarSO4/molarSulfate),
			noisy(nitrate*molarNO3/molarNitrateSalt), noisy(sulfate*2*molarNH4/molarSulfate+nitrate*molarNH4/molarNitrateSalt))
		remark := ""
		soot := fmt.Sprintf("%.3f", noisy(v*demoSoot*rhoSoot))
		if during(t, "03-15 02:00", "03-15 02:10") {
			soot, remark = "<0.05", `"filter change, ""as planned"""`
		}
		fmt.Fprintf(&b, ",%s,%s\r\n", soot, remark)
	}
	return b.Bytes()
}

func demoTruth() []byte {
	var b bytes.Buffer
	b.WriteString("start_time,end_time,mode1_number_per_cm3,mode1_diameter_nm,mode1_gsd,mode2_number_per_cm3,mode2_diameter_nm,mode2_gsd,kappa")
	for _, s := range demoLevels {
		fmt.Fprintf(&b, ",ccn_at_%g_percent_per_cm3", s)
	}
	b.WriteString("\r\n")
	for t := demoBegin; t.Before(demoBegin.AddDate(0, 0, demoDays)); t = t.Add(ccnEvery) {
		tr := truthAt(t.Add(ccnEvery / 2))
		fmt.Fprintf(&b, "%s,%s", t.Format(time.RFC3339), t.Add(ccnEvery).Format(time.RFC3339))
		for i := range tr.n {
			fmt.Fprintf(&b, ",%.2f,%.3f,%.2f", tr.n[i], tr.dg[i], tr.gsd[i])
		}
		fmt.Fprintf(&b, ",%.5f", tr.kappa)
		for _, s := range demoLevels {
			fmt.Fprintf(&b, ",%.2f", tr.ccn(s))
		}
		b.WriteString("\r\n")
	}
	return b.Bytes()
}

const (
	demoSizes   = "sizes.nas"
	demoCCN     = "ccn-counts_demo-station_20260314_R0.ict"
	demoAir     = "station.csv"
	demoTruths  = "truth.csv"
	largestDemo = 300_000 // bytes
)

// TestDemoFiles compares the demo with its program, byte for byte; with
// DROPCREST_WRITE_DEMO=1 it writes it.
func TestDemoFiles(t *testing.T) {
	src := func(stream uint64) demo { return demo{rand.NewPCG(20260314, stream)} }
	for name, data := range map[string][]byte{
		demoSizes: src(1).sizes(), demoCCN: src(2).ccn(), demoAir: src(3).station(), demoTruths: demoTruth(),
	} {
		path := filepath.Join(demoDir, name)
		if len(data) > largestDemo {
			t.Errorf("%s has %d bytes, want at most %d", name, len(data), largestDemo)
		}
		if os.Getenv("DROPCREST_WRITE_DEMO") == "1" {
			if err := os.MkdirAll(demoDir, 0o777); err != nil {
				t.Fatal(err)
			}
			if err := os.WriteFile(path, data, 0o666); err != nil {
				t.Fatal(err)
			}
		}
		got, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		if !bytes.Equal(got, data) {
			t.Errorf("%s is not what its program writes: DROPCREST_WRITE_DEMO=1 go test -run TestDemo ./ui/fieldfile", name)
		}
	}
}
