package form

import (
	"cmp"
	"errors"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"
	"time"

	"dropcrest/ui/answer"
	"dropcrest/ui/fieldfile"
)

// icarttRows turns rows of one record at one supersaturation each into records with
// a column a supersaturation, as ICARTT has them. It holds all of them, as numbers:
// the header names the columns, and which there are is known at the end.
type icarttRows struct {
	out     io.Writer
	at      map[string]int // places of the columns
	levels  []float64      // supersaturations, %, as they came
	records []wideRecord
}

// wideRecord is one record. Values are those of the first level, then of the second
// and so on; those of levels that came later are not there.
type wideRecord struct {
	start, end time.Time
	kappa      float64
	values     []float64
}

// leveled are the quantities that ICARTT has at each supersaturation. What was
// measured stands before what is predicted, so that a reader that looks for counts
// finds those.
var leveled = []struct {
	key, name, long string // name: the start of the column's; long: "": as the quantity is called
	quantity        fieldfile.Quantity
}{
	{"measured_ccn_per_m3", "ccn", "", fieldfile.CCN},
	{"uncertainty", "ccn_uncertainty", "", fieldfile.CCNUncertainty},
	{"ccn_per_m3", "predicted_ccn", "predicted number concentration of cloud condensation nuclei", fieldfile.CCN},
	{"ratio", "ratio", "predicted over measured CCN", fieldfile.Number},
	{"kappa_by_count", "kappa_by_count", "hygroscopicity that the count implies", fieldfile.Number},
}

// mostLevels is how many supersaturations become columns.
const mostLevels = 64

// sameLevel is how far two supersaturations of one set point may differ.
const sameLevel = 5e-4

func (w *icarttRows) columns(columns []answer.Column) error {
	w.at = map[string]int{}
	for i, c := range columns {
		w.at[c.Key] = i
	}
	for _, key := range []string{"start_time", "end_time", "supersaturation_percent", "ccn_per_m3"} {
		if _, ok := w.at[key]; !ok {
			return fmt.Errorf("these rows have no %s: ICARTT holds counts of records over time", key)
		}
	}
	return nil
}

func (w *icarttRows) row(row []any) error {
	start, err := w.time(row, "start_time")
	if err != nil {
		return err
	}
	end, err := w.time(row, "end_time")
	if err != nil {
		return err
	}
	if n := len(w.records); n == 0 || !w.records[n-1].start.Equal(start) {
		w.records = append(w.records, wideRecord{start, end, w.number(row, "kappa"), make([]float64, 0, len(w.levels)*len(leveled))})
	}
	s := w.number(row, "supersaturation_percent")
	if math.IsNaN(s) {
		return nil
	}
	level := slices.IndexFunc(w.levels, func(l float64) bool { return math.Abs(l-s) <= sameLevel*l })
	if level < 0 {
		if level = len(w.levels); level == mostLevels {
			return fmt.Errorf("more than %d supersaturations: ICARTT has a column for each, want csv or jsonl", mostLevels)
		}
		w.levels = append(w.levels, s)
	}
	r := &w.records[len(w.records)-1]
	for len(r.values) < (level+1)*len(leveled) {
		r.values = append(r.values, math.NaN())
	}
	for i, q := range leveled {
		r.values[level*len(leveled)+i] = w.number(row, q.key)
	}
	return nil
}

func (w *icarttRows) time(row []any, key string) (time.Time, error) {
	text, _ := row[w.at[key]].(string)
	return time.Parse(time.RFC3339Nano, text)
}

// number is NaN where there is none.
func (w *icarttRows) number(row []any, key string) float64 {
	if i, ok := w.at[key]; ok {
		if x, ok := row[i].(float64); ok {
			return x
		}
	}
	return math.NaN()
}

func (w *icarttRows) close(s Sheet) error {
	if len(w.records) == 0 {
		return errors.New("no record to write")
	}
	order := make([]int, len(w.levels))
	for i := range order {
		order[i] = i
	}
	slices.SortFunc(order, func(a, b int) int { return cmp.Compare(w.levels[a], w.levels[b]) })
	out, err := fieldfile.NewICARTTWriter(w.out, w.header(s), w.outputs(order))
	if err != nil {
		return err
	}
	cell := func(x float64) fieldfile.Cell {
		if math.IsNaN(x) {
			return fieldfile.Cell{}
		}
		return fieldfile.Measured(x)
	}
	var rec fieldfile.Record
	for _, r := range w.records {
		rec.Start, rec.End = r.start, r.end
		rec.Cells = append(rec.Cells[:0], cell(r.kappa))
		for _, level := range order {
			for i := range leveled {
				x := math.NaN()
				if at := level*len(leveled) + i; at < len(r.values) {
					x = r.values[at]
				}
				rec.Cells = append(rec.Cells, cell(x))
			}
		}
		if err := out.Write(&rec); err != nil {
			return err
		}
	}
	return out.Flush()
}

// outputs are the columns of the file.
func (w *icarttRows) outputs(order []int) []fieldfile.Output {
	out := []fieldfile.Output{{Role: fieldfile.Role{Quantity: fieldfile.Kappa}, Long: "hygroscopicity of the particles"}}
	for _, level := range order {
		s := strconv.FormatFloat(w.levels[level], 'g', 6, 64)
		for _, q := range leveled {
			o := fieldfile.Output{Role: fieldfile.Role{Quantity: q.quantity, At: w.levels[level] / 100}}
			o.Name = q.name + "_at_" + s + "_percent" // a name of ICARTT has 31 signs at most
			if q.long != "" {
				o.Long = q.long + " at " + s + " % supersaturation"
			}
			if q.quantity != fieldfile.Number {
				o.Role.Basis = fieldfile.Standard
			}
			out = append(out, o)
		}
	}
	return out
}

func (w *icarttRows) header(s Sheet) fieldfile.ICARTTHeader {
	h := fieldfile.ICARTTHeader{
		Source: strings.TrimSpace("dropcrest " + s.Version), Begin: w.records[0].start, Revised: s.Made, Interval: w.interval(),
		Comments: []string{s.statement()},
		Keywords: map[string]string{
			"DATA_INFO":   "number concentrations at 273.15 K and 1013.25 hPa; predicted and measured counts of cloud condensation nuclei",
			"UNCERTAINTY": "one standard uncertainty of each measured count in a column of its own",
		},
	}
	if s.Made.IsZero() {
		h.Revised = w.records[len(w.records)-1].end
	}
	for _, n := range s.Answer.Notes {
		h.Comments = append(h.Comments, "note: "+n.Text)
	}
	return h
}

// interval is the time between records, 0 when it is not constant.
func (w *icarttRows) interval() time.Duration {
	var all time.Duration
	for i := 1; i < len(w.records); i++ {
		d := w.records[i].start.Sub(w.records[i-1].start)
		if i > 1 && d != all {
			return 0
		}
		all = d
	}
	return all
}
