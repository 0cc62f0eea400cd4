package answer

import (
	"context"
	"encoding/csv"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"

	"dropcrest/koehler/ascent"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// Part is one of several parts of a file of cases: every Of-th row from the At-th on,
// both counted from 1. The zero Part is all.
type Part struct{ At, Of int }

// Check returns nil or what is wrong.
func (p Part) Check() error {
	if p == (Part{}) || p.Of >= 1 && p.At >= 1 && p.At <= p.Of {
		return nil
	}
	return fmt.Errorf("part %d of %d: want k/n with k from 1 to n", p.At, p.Of)
}

// readPart reads "3/64"; nothing is all.
func readPart(text string) (Part, error) {
	if text == "" {
		return Part{}, nil
	}
	at, of, _ := strings.Cut(text, "/")
	k, err := strconv.Atoi(strings.TrimSpace(at))
	n, also := strconv.Atoi(strings.TrimSpace(of))
	p := Part{k, n}
	if err != nil || also != nil || p == (Part{}) || p.Check() != nil {
		return Part{}, &InputError{Input: "part", Text: fmt.Sprintf("%q is no part: want one such as 3/64, the third of 64", text)}
	}
	return p, nil
}

// holds tells whether the row with that number, from 0, belongs to the part.
func (p Part) holds(row int) bool { return p.Of < 2 || row%p.Of == p.At-1 }

// mostCases keeps a file of cases from filling the memory.
const mostCases = 1 << 20

// caseRow is one row of a file of cases.
type caseRow struct {
	line  int
	label string
	asked scenario.Scenario
	fault string // why the row cannot be read
}

// caseColumns are those of the results.
var caseColumns = []Column{
	{"line", "line of the file"},
	{"case", "case"},
	{"updraft_m_per_s", "updraft, m/s"},
	{"peak_supersaturation_percent", "peak, %"},
	{"height_of_peak_m", "height of the peak, m"},
	{"temperature_at_peak_k", "temperature at the peak, K"},
	{"droplets_per_m3", "droplets, 1/m³"},
	{"droplets_at_peak_per_m3", "droplets at the peak, 1/m³"},
	{"droplets_stp_per_m3", "droplets at STP, 1/m³"},
	{"grown_droplets_per_m3", "grown, 1/m³"},
	{"particles_per_m3", "particles, 1/m³"},
	{"twomey_1959_droplets_per_m3", "Twomey 1959, 1/m³"},
	{"abdul_razzak_ghan_2000_droplets_per_m3", "Abdul-Razzak & Ghan 2000, 1/m³"},
	{"fountoukis_nenes_2005_droplets_per_m3", "Fountoukis & Nenes 2005, 1/m³"},
	{"problem", "why there is no result"},
}

// CasesFacts is the JSON object of a file of cases; the rows stand in its table.
type CasesFacts struct {
	Cases  int `json:"cases"`
	Failed int `json:"failed"`
}

// AscentCases makes one ascent for each row of the file of cases, or of a part of it.
// Rows come in the order of the file, streamed where env has a Row. A row that
// fails has its reason, and the rest goes on.
func AscentCases(ctx context.Context, env Env, s scenario.Scenario, part Part) (Answer, error) {
	if err := part.Check(); err != nil {
		return Answer{}, &InputError{Input: "cases", Text: err.Error()}
	}
	rows, err := readCases(env, s, part)
	if err != nil {
		return Answer{}, err
	}
	if env.Kept == nil {
		env.Kept = &Kept{}
	}
	t := Table{Key: "cases", Title: "Cases", Columns: caseColumns}
	if env.Columns != nil {
		if err := env.Columns(t.Key, t.Columns); err != nil {
			return Answer{}, err
		}
	}
	facts := CasesFacts{Cases: len(rows)}
	lows, highs := math.Inf(1), 0.0
	err = ascent.Each(ctx, 0, len(rows), max(1, env.Workers), func(ctx context.Context, i int) []any {
		return env.oneCase(ctx, rows[i])
	}, func(i int, row []any) error {
		if row[len(row)-1] != nil {
			facts.Failed++
		} else if n, ok := row[6].(float64); ok {
			lows, highs = math.Min(lows, n), math.Max(highs, n)
		}
		if env.Progress != nil {
			env.Progress(int64(i+1), int64(len(rows)))
		}
		if env.Row != nil {
			return env.Row(t.Key, row)
		}
		t.Rows = append(t.Rows, row)
		return nil
	})
	if err != nil {
		return Answer{}, err
	}
	says := fmt.Sprintf("%d ascents", len(rows))
	if highs > 0 {
		says += fmt.Sprintf(" give %s to %s droplets per cm³", cubic(lows), cubic(highs))
	}
	if facts.Failed > 0 {
		says += fmt.Sprintf("; %d of them failed, as their rows say", facts.Failed)
	}
	return Answer{Finding: []string{says + "."}, Facts: facts, Tables: []Table{t},
		Why: []string{"Each row of the file is an ascent of its own; a cell changes what is asked otherwise. The ascents are those of the Ascent question."}}, nil
}

// readCases reads the file. What is wrong with its head is an error, what is wrong with
// a row is said in that row.
func readCases(env Env, s scenario.Scenario, part Part) ([]caseRow, error) {
	fail := func(line int, err error) ([]caseRow, error) {
		return nil, &InputError{Input: "cases", Text: fmt.Sprintf("%s:%d: %s", plain.Clean(s.Cases), line, reason(err))}
	}
	in, err := openFile(env, s.Cases, false)
	if err != nil {
		return nil, &InputError{Input: "cases", Text: err.Error()}
	}
	defer in.Close()
	file := csv.NewReader(in)
	file.Comment, file.TrimLeadingSpace, file.FieldsPerRecord = '#', true, -1
	names, err := file.Read()
	if err != nil {
		return fail(1, errors.New("no line with the names of the columns"))
	}
	base := s.Clone()
	base.Cases, base.Sweep = "", ""
	head, err := scenario.NewCases(&base, names)
	if err != nil {
		line, _ := file.FieldPos(0)
		return fail(line, err)
	}
	var out []caseRow
	for n := 0; ; n++ {
		cells, err := file.Read()
		if errors.Is(err, io.EOF) {
			return out, nil
		}
		var parse *csv.ParseError
		switch {
		case errors.As(err, &parse):
			return fail(parse.Line, parse.Err)
		case err != nil:
			return nil, &InputError{Input: "cases", Text: err.Error()}
		case n == mostCases:
			return nil, &InputError{Input: "cases", Text: fmt.Sprintf("%s has more than %d rows", plain.Clean(s.Cases), mostCases)}
		case !part.holds(n):
			continue
		}
		row := caseRow{}
		row.line, _ = file.FieldPos(0)
		if row.asked, row.label, err = head.Row(base, cells); err != nil {
			row.fault = err.Error()
		}
		out = append(out, row)
	}
}

// oneCase is the row of results of a case.
func (env Env) oneCase(ctx context.Context, c caseRow) []any {
	row := make([]any, len(caseColumns))
	row[0], row[1] = float64(c.line), word(c.label)
	r, err := env.plainRise(ctx, c)
	if err != nil {
		row[len(row)-1] = plain.Clean(reason(err))
		return row
	}
	for i, x := range []float64{r.parcel.Updraft, 100 * r.Peak.Supersaturation, r.Peak.Height, r.Peak.Temperature,
		r.Droplets, r.DropletsAtPeak, r.DropletsSTP, r.Grown, r.Number} {
		row[2+i] = cell(x)
	}
	for i, f := range r.forms {
		if f.none == nil {
			row[11+i] = cell(f.Droplets)
		}
	}
	if !r.HasPeak {
		row[len(row)-1] = fmt.Sprintf("no peak up to %s m", shortest(r.End.Height))
	}
	return row
}

// plainRise is an ascent with the closed forms and nothing else.
func (env Env) plainRise(ctx context.Context, c caseRow) (*risen, error) {
	if c.fault != "" {
		return nil, errors.New(c.fault)
	}
	env.Progress = nil
	of, err := env.rising(ctx, c.asked)
	if err != nil {
		return nil, err
	}
	r := &risen{asked: c.asked, of: of, parcel: of.parcel(c.asked)}
	o := ascentOptions(c.asked)
	if c.asked.UpdraftSpread > 0 {
		mean, err := updraftsOf(c.asked).Droplets(ctx, 1, r.parcel, o)
		if err != nil {
			return nil, of.problem(err)
		}
		r.ofSpread, r.parcel.Updraft = &mean, shownUpdraft(mean)
	}
	if r.Result, err = ascent.Run(ctx, r.parcel, o); err != nil {
		return nil, of.problem(err)
	}
	r.forms = of.closedForms(r.parcel, o)
	return r, nil
}
