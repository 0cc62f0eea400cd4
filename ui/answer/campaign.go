package answer

import (
	"context"
	"errors"
	"io"

	"dropcrest/atmos"
	"dropcrest/ui/fieldfile"
	"dropcrest/ui/scenario"
)

// demoFiles are the files of the invented station, the one with the counts first: its
// records, the longest ones, are the windows, so that no count counts twice.
var demoFiles = []string{"ccn-counts_demo-station_20260314_R0.ict", "sizes.nas", "station.csv"}

// campaignFacts is what there is to say about data as a whole.
type campaignFacts struct {
	records  int
	mapping  []string // "file: column=quantity", as it was understood
	rejected rejections
	notes    []atmos.Note
}

// campaign hands out the records of the data in their order, in constant memory:
// files opened and merged on time, in one state of air, points judged by the rules
// of quality. Observations are not used again, so each may keep them.
func campaign(ctx context.Context, env Env, s scenario.Scenario, each func(*observation) error) (campaignFacts, error) {
	r, err := newRecorder(env, s)
	if err != nil {
		return campaignFacts{}, err
	}
	files, err := openData(env, s)
	if err != nil {
		return campaignFacts{}, err
	}
	defer files.close()
	r.parts = partsOf(files.files)
	merger := files.merge(s, r)
	var sample fieldfile.Sample
	for {
		if err := ctx.Err(); err != nil {
			return campaignFacts{}, err
		}
		err := merger.Next(&sample)
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return campaignFacts{}, dataError(err)
		}
		if err := each(r.observe(&sample)); err != nil {
			return campaignFacts{}, err
		}
		files.tell(env)
	}
	facts := campaignFacts{records: r.number, mapping: files.mapping, rejected: r.rejected(), notes: append(files.notes(), r.notes...)}
	if facts.records == 0 {
		return facts, &InputError{Input: "data", Text: "the data have no records"}
	}
	return facts, nil
}
