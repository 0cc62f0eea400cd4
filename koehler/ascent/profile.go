package ascent

import "math"

// profile collects the rows of a result as the ascent goes.
type profile struct {
	rows      []Row
	next      int
	critical  []float64 // wet radii of the drops' crests at the start, m
	at        point
	followed  int // the first drop that is followed
	following int
}

// prepareProfile makes all room that the rows need.
func (r *run) prepareProfile() error {
	p, n := &r.profile, r.opt.ProfileRows
	p.followed, p.following = r.bins, len(r.opt.Follow)
	if n == 0 {
		return nil
	}
	p.rows = make([]Row, n)
	room := make([]float64, n*p.following)
	for i := range p.rows {
		p.rows[i].Followed = room[i*p.following : (i+1)*p.following : (i+1)*p.following]
	}
	p.at = r.newPoint()
	p.critical = make([]float64, len(r.dry))
	for ci := range r.cohorts {
		c := &r.cohorts[ci]
		for i := c.first; i < c.last; i++ {
			wet, err := r.system.critical(c, i, r.startT)
			if err != nil {
				return &GroupError{Group: c.index, Err: err}
			}
			p.critical[i] = wet
		}
	}
	return nil
}

// emit fills the rows up to the end of the step of h that has just been made. A row
// inside it comes from the dense output.
func (r *run) emit(h, end float64, isLast bool) {
	p := &r.profile
	for p.next < len(p.rows) {
		at := r.last * float64(p.next) / float64(len(p.rows)-1)
		switch {
		case p.next == 0 && h == 0:
			p.rows[0] = r.row(&r.from, 0, p.rows[0].Followed)
		case at > end*(1+1e-12):
			if isLast { // stopped at the peak: the profile ends there
				p.rows[p.next] = r.row(&r.to, end, p.rows[p.next].Followed)
				p.rows = p.rows[:p.next+1]
			}
			return
		case at >= end*(1-1e-12):
			p.rows[p.next] = r.row(&r.to, end, p.rows[p.next].Followed)
		default:
			r.dense(&p.at, 1-(end-at)/h)
			r.evaluate(&p.at)
			p.rows[p.next] = r.row(&p.at, at, p.rows[p.next].Followed)
		}
		p.next++
		if h == 0 {
			return
		}
	}
}

func (r *run) row(q *point, time float64, followed []float64) Row {
	row := Row{State: r.state(q, time), Followed: followed}
	var n, sum, squares float64
	for i := range r.bins {
		if q.r[i] > r.profile.critical[i] {
			n += r.number[i]
			sum += r.number[i] * q.r[i]
			squares += r.number[i] * q.r[i] * q.r[i]
		}
	}
	if n > 0 {
		row.Droplets = n * r.system.dense
		row.MeanRadius = sum / n
		row.SpreadRadius = math.Sqrt(math.Max(0, squares/n-row.MeanRadius*row.MeanRadius))
	}
	for i := range followed {
		followed[i] = q.r[r.profile.followed+i]
	}
	return row
}
