package answer

import (
	"context"
	"slices"

	"dropcrest/ui/scenario"
)

// ofRecords is the population of measured data: of one record, or of all of them.
func ofRecords(ctx context.Context, env Env, s scenario.Scenario) (*activated, error) {
	if s.Record.Is("all") {
		return ofAllRecords(ctx, env, s)
	}
	o, facts, err := oneRecord(ctx, env, s, int(s.Record.Number))
	if err != nil {
		return nil, err
	}
	one := func(s scenario.Scenario) (*activated, error) {
		c, err := newComposer(env, s)
		if err != nil {
			return nil, err
		}
		return c.ofRecord(&o)
	}
	a, err := one(s)
	if err != nil {
		return nil, err
	}
	a.vary = one
	a.know(facts)
	return a, a.solve()
}

// know takes what is said of the data as a whole.
func (a *activated) know(facts campaignFacts) {
	a.records, a.mapping = facts.records, facts.mapping
	a.notes = distinct(slices.Concat(a.notes, facts.notes))
}

func ofAllRecords(ctx context.Context, env Env, s scenario.Scenario) (*activated, error) {
	c, err := newComposer(env, s)
	if err != nil {
		return nil, err
	}
	rows := newRecordRows(env)
	q := newSeason(c, rows)
	facts, err := campaign(ctx, env, s, func(o *observation) error {
		a, err := c.ofRecord(o)
		if err != nil {
			return err
		}
		if err := a.predict(); err != nil {
			return err
		}
		return q.add(a)
	})
	if err != nil {
		return nil, err
	}
	a, err := q.close()
	if err != nil {
		return nil, err
	}
	a.know(facts)
	a.rejected = facts.rejected
	a.rows = rows
	return a, nil
}
