package answer

import (
	"context"
	"errors"
	"fmt"
	"io"

	"dropcrest/atmos"
	"dropcrest/atmos/aerosol"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// oneBins is the size distribution of a file that holds one, or the first one of a
// file that holds several.
func oneBins(ctx context.Context, env Env, s scenario.Scenario) (*aerosol.Bins, []atmos.Note, error) {
	fail := func(err error) (*aerosol.Bins, []atmos.Note, error) {
		var in *InputError
		if errors.As(err, &in) {
			return nil, nil, err
		}
		return nil, nil, &InputError{Input: "bins", Text: plain.Clean(err.Error())}
	}
	if s.Bins == "" {
		return fail(errors.New("no file of bins is given: bins= names a CSV file with diameters and dN/dlog10D, dN/dlnD or counts"))
	}
	in, err := openFile(env, s.Bins, false)
	if err != nil {
		return fail(err)
	}
	defer in.Close()
	file, err := fieldfile.Open(s.Bins, in, fieldfile.Options{})
	if err != nil {
		return fail(err)
	}
	if err := useMap([]*fieldfile.File{file}, s.Map); err != nil {
		return fail(err)
	}
	var sample, further fieldfile.Sample
	samples := file.Samples()
	if err := samples.Next(&sample); err != nil {
		if errors.Is(err, io.EOF) {
			err = fmt.Errorf("%s: there is no size distribution in it", s.Bins)
		}
		return fail(err)
	}
	r, err := newRecorder(env, s)
	if err != nil {
		return fail(err)
	}
	r.parts = partsOf([]*fieldfile.File{file})
	o := r.observe(&sample)
	if o.sizes == nil {
		return fail(fmt.Errorf("%s: %s", s.Bins, o.noSizes))
	}
	if samples.Next(&further) == nil {
		o.notes = append(o.notes, atmos.Note{Code: "first-distribution", Input: "bins",
			Text: "The file of bins holds more than one size distribution: the first one is taken. As measured data all of them can be looked at."})
	}
	return o.sizes, o.notes, ctx.Err()
}
