package fieldfile

import (
	"io"
	"time"
)

// Source is one of several files, with what has to be added to its clock.
type Source struct {
	Samples *Samples
	Offset  time.Duration
	// Look sees each sample before it is averaged, its clock set right, and may
	// take out what does not count; nil: nobody looks.
	Look func(*Sample)
}

// Merging says how files come onto one time axis.
type Merging struct {
	Every   time.Duration // windows of that length, from 00:00 UTC on; 0: the records of the first file
	Average Averaging
}

// Merger hands out one sample a window, with what every file has in it:
//
//   - Where the first file gives instants, a window reaches to its next record, or
//     over a gap as far as its records usually do.
//   - A record counts in each window with the time it shares with it, so that a
//     composition over an hour serves all of the hour's size scans. An instant
//     belongs to the window it lies in and counts as one second.
//   - A single value is taken from the first file that has it; the sizes of all
//     files stand one after the other; counts of one supersaturation are joined
//     (within 5 %), by what was set where the files say it.
//   - Uncertainties are combined as independent, counts are added up.
//
// Memory holds one record of each file and one window.
type Merger struct {
	how     Merging
	sources []*source
	owner   [Quantities]int
	window  window
	started bool
	at      time.Time // start of the next window, for Every
	err     error
}

// source reads one file with one sample in hand, and where its records are the
// windows also the next one.
type source struct {
	Source
	now, ahead Sample
	have, more bool // now and ahead hold a sample
	done       bool
	last       time.Time
	windows    bool
	usual      time.Duration // the shortest step between records so far
}

// Merge begins to read the files. The first one gives the windows where
// how.Every is 0.
func Merge(how Merging, sources ...Source) *Merger {
	m := &Merger{how: how}
	for q := range m.owner {
		m.owner[q] = -1
	}
	for i, s := range sources {
		m.sources = append(m.sources, &source{Source: s, windows: i == 0 && how.Every == 0})
		for _, r := range s.Samples.f.roles {
			if m.owner[r.Quantity] < 0 {
				m.owner[r.Quantity] = i
			} else if m.owner[r.Quantity] != i && single(r.Quantity) {
				s.Samples.f.notes.add("owned"+r.Quantity.String(), 0, "%s is taken from %s", r.Quantity, sources[m.owner[r.Quantity]].Samples.f.name)
			}
		}
	}
	return m
}

// single reports whether a quantity has one value a sample.
func single(q Quantity) bool {
	return q != Unused && declared[q].kind == asNumber && declared[q].at == nowhere
}

// step goes on to the next sample.
func (s *source) step() (err error) {
	if !s.windows {
		s.have, err = s.fetch(&s.now)
		return err
	}
	s.now, s.ahead, s.have = s.ahead, s.now, s.more
	s.more, err = s.fetch(&s.ahead)
	if gap := s.ahead.Start.Sub(s.now.Start); s.have && s.more && gap > 0 && (s.usual == 0 || gap < s.usual) {
		s.usual = gap
	}
	return err
}

// fetch reads a sample; the clock of a merged file must not run back.
func (s *source) fetch(to *Sample) (bool, error) {
	if s.done {
		return false, nil
	}
	err := s.Samples.Next(to)
	if err == io.EOF {
		s.done = true
		return false, nil
	}
	if err != nil {
		return false, err
	}
	f := s.Samples.f
	if to.Start.IsZero() {
		return false, f.wrongAt(to.Line, 0, "no time in the record, but files are merged on time", "a column mapped to time, start_time or mid_time")
	}
	to.Start, to.End = to.Start.Add(s.Offset), to.End.Add(s.Offset)
	if to.Start.Before(s.last) {
		return false, f.wrongAt(to.Line, 0, "time runs backwards, from "+s.last.Format(time.RFC3339)+" to "+to.Start.Format(time.RFC3339),
			"records in order of time where files are merged")
	}
	s.last = to.Start
	if s.Look != nil {
		s.Look(to)
	}
	return true, nil
}

// end of the window that the sample in hand gives.
func (s *source) end() time.Time {
	from := s.now.Start
	const fewest = time.Second
	switch gap := s.ahead.Start.Sub(from); {
	case s.now.End.After(from):
		return s.now.End
	case s.more && gap > 0 && gap <= 2*s.usual:
		return s.ahead.Start
	case s.usual > 0:
		return from.Add(s.usual)
	}
	return from.Add(fewest)
}

// Next gives the next window that holds anything; io.EOF ends them.
func (m *Merger) Next(out *Sample) error {
	if m.err != nil {
		return m.err
	}
	for {
		from, to, err := m.nextWindow()
		if err == nil {
			m.window.reset(from, to)
			err = m.gather()
		}
		if err != nil {
			m.err = err
			return err
		}
		if m.window.samples > 0 {
			m.window.give(out, m.how.Average)
			return nil
		}
	}
}

func (m *Merger) start() error {
	if m.started {
		return nil
	}
	m.started = true
	for _, s := range m.sources {
		if s.windows { // the sample in hand and the one after it
			if err := s.step(); err != nil {
				return err
			}
		}
		if err := s.step(); err != nil {
			return err
		}
	}
	return nil
}

// nextWindow is the next interval to fill.
func (m *Merger) nextWindow() (from, to time.Time, err error) {
	if err := m.start(); err != nil {
		return from, to, err
	}
	if m.how.Every > 0 {
		return m.nextOfGrid()
	}
	first := m.sources[0]
	if !first.have {
		return from, to, io.EOF
	}
	return first.now.Start, first.end(), nil
}

// nextOfGrid goes on to the window of the earliest sample in hand: empty ones
// are left out.
func (m *Merger) nextOfGrid() (from, to time.Time, err error) {
	var earliest time.Time
	for _, s := range m.sources {
		if s.have && (earliest.IsZero() || s.now.Start.Before(earliest)) {
			earliest = s.now.Start
		}
	}
	if earliest.IsZero() {
		return from, to, io.EOF
	}
	from = earliest.Truncate(m.how.Every)
	if from.Before(m.at) {
		from = m.at
	}
	m.at = from.Add(m.how.Every)
	return from, m.at, nil
}

// gather adds what all files have in the window. Samples that end with it are
// left behind, those that reach further stay in hand.
func (m *Merger) gather() error {
	for i, s := range m.sources {
		for taken := 0; s.have && s.now.Start.Before(m.window.to); taken++ {
			if s.windows && taken > 0 {
				break // the window is one record of this file
			}
			if seconds, share := m.window.shared(&s.now); seconds > 0 {
				m.window.add(m, i, &s.now, seconds, share)
			}
			if s.now.End.After(m.window.to) && !s.windows {
				break
			}
			if err := s.step(); err != nil {
				return err
			}
		}
	}
	return nil
}
