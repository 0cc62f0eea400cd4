package answer

import (
	"context"
	"fmt"
	"strings"

	"dropcrest/ui/scenario"
)

// mostKeptRecords is up to how many records of data are all kept between two
// answers, so that stepping from one to the next is done within a frame. Of longer
// data those around the record that was asked for are kept.
const (
	mostKeptRecords = 5000
	keptAround      = 500 // on either side
)

// keptData are the records of data that were read, until other data are read.
type keptData struct {
	key     string
	first   int // number of the first one that is kept
	records []*observation
	facts   campaignFacts
}

// dataKey is what the records of a scenario depend on.
func dataKey(s scenario.Scenario) string {
	return fmt.Sprint(s.Data, s.Map, s.Every, s.Average, s.Rules, s.Penetration, s.DrySizeIs, s.ShapeFactor, s.Calibration, s.CalibrationAfter, s.SetSlope, s.SetIntercept)
}

// stampOf tells whether the files of a scenario are still the ones that were read:
// they may be written to while they are looked at. Where nothing is kept no file is
// opened for it: a pipe can be read only once.
func stampOf(env Env, s scenario.Scenario) string {
	return stampOfFiles(env, append([]scenario.DataFile{{Name: s.Penetration}}, s.Data...))
}

// stampOfScans is stampOf for files of scans.
func stampOfScans(env Env, s scenario.Scenario) string { return stampOfFiles(env, s.Scans) }

func stampOfFiles(env Env, files []scenario.DataFile) string {
	var stamp strings.Builder
	if env.Kept == nil {
		return ""
	}
	for _, f := range files {
		if f.Name == "" || f.Name == scenario.DemoData || env.Open == nil {
			continue
		}
		in, err := env.Open(f.Name)
		if err != nil {
			continue // the reading says it, or it is no file
		}
		if info := infoOf(in); info != nil {
			fmt.Fprint(&stamp, " ", info.Size(), " ", info.ModTime().UnixNano())
		}
		_ = in.Close()
	}
	return stamp.String()
}

// oneRecord is record n of the data, counted from 1, with what there is to say
// about them as a whole. Records are kept, so that the next one comes at once.
func oneRecord(ctx context.Context, env Env, s scenario.Scenario, n int) (observation, campaignFacts, error) {
	key := dataKey(s) + stampOf(env, s)
	d := env.Kept.dataOf(key, n)
	if d == nil {
		var err error
		if d, err = readAround(ctx, env, s, n); err != nil {
			return observation{}, campaignFacts{}, err
		}
		d.key = key
		env.Kept.keepData(d)
	}
	if o := d.at(n); o != nil {
		return *o, d.facts, nil
	}
	return observation{}, d.facts, &InputError{Input: "record", Text: fmt.Sprintf("there is no record %d: the data have %d", n, d.facts.records)}
}

// readAround reads all records of short data, those around record n of long ones.
func readAround(ctx context.Context, env Env, s scenario.Scenario, n int) (*keptData, error) {
	d := &keptData{first: 1}
	var near []*observation
	facts, err := campaign(ctx, env, s, func(o *observation) error {
		if o.number <= mostKeptRecords {
			d.records = append(d.records, o)
		} else {
			d.records = nil // too many
		}
		if o.number >= n-keptAround && o.number <= n+keptAround {
			near = append(near, o)
		}
		return nil
	})
	if err != nil {
		return nil, err
	}
	if d.facts = facts; facts.records > mostKeptRecords {
		d.records = near
		d.first = max(n-keptAround, 1)
	}
	return d, nil
}

// at is record n, nil where it is not kept.
func (d *keptData) at(n int) *observation {
	if i := n - d.first; i >= 0 && i < len(d.records) {
		return d.records[i]
	}
	return nil
}

// dataOf are the data of a key with record n, or all there is to say about it: that
// there is no such record. nil: they must be read.
func (k *Kept) dataOf(key string, n int) *keptData {
	if k == nil {
		return nil
	}
	k.mu.Lock()
	defer k.mu.Unlock()
	d := k.data
	if d == nil || d.key != key || d.at(n) == nil && n >= 1 && n <= d.facts.records {
		return nil
	}
	return d
}

func (k *Kept) keepData(d *keptData) {
	if k == nil {
		return
	}
	k.mu.Lock()
	defer k.mu.Unlock()
	k.data = d
}
