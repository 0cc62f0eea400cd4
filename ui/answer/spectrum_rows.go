package answer

import "slices"

// recordRows are the rows of all records: handed on as they come, or collected
// where nobody takes them.
type recordRows struct {
	env    Env
	begun  bool
	kept   Table
	missed int
}

// mostRows are as many rows as are collected; more are for a file.
const mostRows = 20000

func newRecordRows(env Env) *recordRows {
	return &recordRows{env: env, kept: Table{Key: "records", Title: "All records", Columns: slices.Concat([]Column{
		{"record", "record"},
		{"start_time", "start, UTC"},
		{"end_time", "end, UTC"},
	}, countColumns, []Column{{"rejected", "what was left out"}})}}
}

func (r *recordRows) add(a *activated) error {
	take := r.env.Row
	if take != nil && !r.begun && r.env.Columns != nil {
		if err := r.env.Columns(r.kept.Key, r.kept.Columns); err != nil {
			return err
		}
	}
	r.begun = true
	reasons := ""
	for i, x := range a.rejected {
		if i > 0 {
			reasons += "; "
		}
		reasons += x.Reason
	}
	return a.countRows(func(row []any) error {
		row = append(row, word(reasons))
		switch {
		case take != nil:
			return take(r.kept.Key, row)
		case len(r.kept.Rows) < mostRows:
			r.kept.Rows = append(r.kept.Rows, row)
		default:
			r.missed++
		}
		return nil
	}, a.number, clock(a.start), clock(a.end))
}
