package answer

import (
	"context"
	"errors"
	"fmt"

	"dropcrest/ui/scenario"
)

// keptData are the records of data that were read, until other data are read.
type keptData struct {
	key     string
	records []*observation
	facts   campaignFacts
}

// dataKey is what the records of a scenario depend on.
func dataKey(s scenario.Scenario) string {
	return fmt.Sprint(s.Data, s.Map, s.Every, s.Average, s.Rules, s.Penetration, s.DrySizeIs, s.ShapeFactor, s.Calibration, s.SecondCalibration)
}

// errEnough ends the reading of data that are too long to be kept.
var errEnough = errors.New("more records than are kept")

// oneRecord is record n of the data, counted from 1, with what there is to say
// about them as a whole. Short data are kept, so that the next one comes at once.
func oneRecord(ctx context.Context, env Env, s scenario.Scenario, n int) (observation, campaignFacts, error) {
	kept, err := records(ctx, env, s)
	switch {
	case err == nil:
		if n < 1 || n > len(kept.records) {
			return observation{}, kept.facts, noRecord(n, len(kept.records))
		}
		return *kept.records[n-1], kept.facts, nil
	case !errors.Is(err, errEnough):
		return observation{}, campaignFacts{}, err
	}
	var found *observation
	facts, err := campaign(ctx, env, s, func(o *observation) error {
		if o.number == n {
			found = o
		}
		return nil
	})
	if err != nil {
		return observation{}, facts, err
	}
	if found == nil {
		return observation{}, facts, noRecord(n, facts.records)
	}
	return *found, facts, nil
}

func noRecord(n, records int) error {
	return &InputError{Input: "record", Text: fmt.Sprintf("there is no record %d: the data have %d", n, records)}
}

// records are all records of short data, kept from before if possible.
func records(ctx context.Context, env Env, s scenario.Scenario) (*keptData, error) {
	key := dataKey(s)
	if env.Kept != nil {
		if d := env.Kept.dataOf(key); d != nil {
			return d, nil
		}
	}
	d := &keptData{key: key}
	facts, err := campaign(ctx, env, s, func(o *observation) error {
		if len(d.records) == mostKeptRecords {
			return errEnough
		}
		d.records = append(d.records, o)
		return nil
	})
	if err != nil {
		return nil, err
	}
	d.facts = facts
	if env.Kept != nil {
		env.Kept.keepData(d)
	}
	return d, nil
}

func (k *Kept) dataOf(key string) *keptData {
	k.mu.Lock()
	defer k.mu.Unlock()
	if k.data != nil && k.data.key == key {
		return k.data
	}
	return nil
}

func (k *Kept) keepData(d *keptData) {
	k.mu.Lock()
	defer k.mu.Unlock()
	k.data = d
}
