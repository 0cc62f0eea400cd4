package ascent

import (
	"context"
	"math"
)

// Run lets the parcel rise. An error is an *InputError, a *GroupError with one inside,
// or a *StoppedError, which wraps the context's error where that ended it.
func Run(ctx context.Context, p Parcel, o Options) (Result, error) {
	p, o, err := completed(p, o)
	if err != nil {
		return Result{}, err
	}
	probes := make([]probe, len(o.Follow))
	for i, t := range o.Follow {
		probes[i] = probe{t.Group, t.DryDiameter}
	}
	r, err := rise(ctx, p, o, probes)
	if err != nil {
		return Result{}, err
	}
	result, err := r.result(p)
	if err != nil || o.Probes == 0 || o.StopAtPeak {
		return result, err
	}
	return r.sharpened(ctx, p, o, result)
}

// rise integrates to the end.
func rise(ctx context.Context, p Parcel, o Options, probes []probe) (*run, error) {
	s, start, err := newSystem(p, o, probes)
	if err != nil {
		return nil, err
	}
	r := &run{stepper: newStepper(s), opt: o}
	if err := r.prepareProfile(); err != nil {
		return nil, err
	}
	r.begin(start)
	return r, r.toTheEnd(ctx)
}

// run is one ascent under way.
type run struct {
	*stepper
	opt                Options
	time               float64 // s, of st.from
	last               float64 // s, of the end
	peak               State
	hasPeak            bool
	lastStep, lastLack float64 // of the last accepted step
	atPeak             bool    // the step ends at a peak
	energy             float64 // residual so far, J per kg of dry air
	stats              Stats
	profile            profile
}

const (
	mostSteps   = 200000
	firstStep   = 1e-3 // of the whole time
	leastStep   = 1e-12
	safety      = 0.9
	mostGrowth  = 5.0
	mostShrink  = 8.0
	retryShrink = 0.25 // where a stage is impossible
	reportEvery = 16   // steps between two calls of Progress
)

func (r *run) begin(start point) {
	r.from.copy(&start)
	r.last = r.opt.Height / r.updraft
	r.peak = r.state(&r.from, 0)
	r.emit(0, 0, true)
}

func (q *point) copy(of *point) {
	r, u, eq, rate := q.r, q.u, q.eq, q.rate
	copy(r, of.r)
	copy(u, of.u)
	copy(eq, of.eq)
	copy(rate, of.rate)
	*q = *of
	q.r, q.u, q.eq, q.rate = r, u, eq, rate
}

func (r *run) state(q *point, time float64) State {
	return State{time, time * r.updraft, q.T, q.p, q.S - 1, q.vapour, q.liquid}
}

func (r *run) toTheEnd(ctx context.Context) error {
	h := firstStep * r.last
	growth := mostGrowth
	for r.time < r.last {
		if err := ctx.Err(); err != nil {
			return r.stopped(err)
		}
		if r.stats.Steps+r.stats.Rejected >= mostSteps {
			return r.stopped(ErrSteps)
		}
		if left := r.last - r.time; h >= left*(1-1e-9) {
			h = left
		}
		if h < leastStep*r.last {
			return r.stopped(ErrStep)
		}
		r.differentiate(r.system, &r.from)
		taken, next, err := r.step(h, growth)
		if err != nil {
			return r.stopped(err)
		}
		growth = mostGrowth
		if taken == 0 { // rejected: the next step may not grow at once
			h, growth = next, 1
			continue
		}
		ended := r.accept(taken)
		if h = next; ended {
			return nil
		}
	}
	return nil
}

// step tries h and returns the step taken, 0 for none, and the one to try next.
func (r *run) step(h, growth float64) (taken, next float64, err error) {
	if !r.try(h) {
		r.stats.Rejected++
		return 0, h * retryShrink, nil
	}
	lack := r.lack()
	factor := math.Max(1/growth, math.Min(mostShrink, math.Pow(lack, 0.25)/safety))
	if !(lack <= 1) {
		r.stats.Rejected++
		return 0, h / math.Max(factor, 1.01), nil
	}
	if r.lastLack > 0 { // as the error has grown since the last step, so it will
		trend := r.lastStep / h * math.Pow(lack*lack/r.lastLack, 0.25) / safety
		factor = math.Max(factor, math.Min(mostShrink, trend))
	}
	r.lastStep, r.lastLack = h, math.Max(lack, 0.01)
	if q := &r.to; !(q.T > coldest && q.T < warmest) {
		return 0, h, ErrCold
	}
	wasAtPeak := r.atPeak // where dS/dt is rounding and may change its sign again and again
	taken, r.atPeak = h, false
	if !wasAtPeak && r.from.rising() > 0 && r.to.rising() <= 0 && math.Max(r.from.S, r.to.S)-1 >= r.peak.Supersaturation-r.bump() {
		taken, r.atPeak = r.toPeak(h), true
	}
	return taken, h / factor, nil
}

// bump is how far the supersaturation must fall below the highest so far to say that
// it was the peak. Few bins make small peaks on the way, one a bin that crosses its
// crest.
func (r *run) bump() float64 { return bumpShare * math.Abs(r.peak.Supersaturation) }

const bumpShare = 2e-3

// rising is dS/dt. In weak updraft it is the small rest of large terms, and the error
// of the smallest drops may turn its sign: it helps to find the peak between two
// steps, whether there was one is told by S itself.
func (q *point) rising() float64 { return q.byT*q.dT + q.byP*q.dp - q.byVapour*q.dl }

// The error of a step against the tolerance. Radii count relative to themselves. The
// saturation ratio follows from temperature, pressure and water, whose small errors
// would be large ones of S - 1: it counts relative to the supersaturation, or to
// leastSuper where that is smaller. The scales are such that the peak comes out to a few
// times the tolerance (ExampleRun_convergence); a step's error is estimated by the
// embedded method and mostly far too large.
const (
	leastSuper  = 3e-3
	scaleSuper  = 20.0
	scaleRadius = 20.0
	scaleT      = 1.0 // K: what the energy of the parcel may lack
)

// lack is the error of the last step over what is allowed.
func (r *run) lack() float64 {
	k := r.k[rodasStages-1]
	radius := r.to.r[:len(k)]
	sum := 0.0
	for i, e := range k {
		e /= radius[i]
		sum += e * e
	}
	tol := r.opt.Tolerance
	worst := math.Abs(r.kT[rodasStages-1]) / scaleT
	worst = math.Max(worst, math.Abs(r.errS)/scaleSuper/math.Max(leastSuper, math.Abs(r.to.S-1)))
	if len(k) > 0 {
		worst = math.Max(worst, math.Sqrt(sum/float64(len(k)))/scaleRadius)
	}
	return worst / tol
}

// peakTries bounds the steps that are made to end where S is highest.
const (
	peakTries = 12
	peakDone  = 1e-4 // of the step, in time
)

// toPeak shortens the step of h so that it ends where dS/dt vanishes, by regula
// falsi with the Illinois rule; each try is a step from the same start. It returns
// the step's length.
func (r *run) toPeak(h float64) float64 {
	lo, hi := 0.0, h
	flo, fhi := r.from.rising(), r.to.rising()
	at, side := h, 0
	for range peakTries {
		next := hi - fhi*(hi-lo)/(fhi-flo)
		if math.Abs(next-at) <= peakDone*h || !(next > lo && next < hi) {
			break
		}
		if !r.try(next) {
			break
		}
		at = next
		f := r.to.rising()
		switch {
		case f == 0:
			return at
		case f > 0:
			lo, flo = at, f
			if side > 0 {
				fhi /= 2
			}
			side = 1
		default:
			hi, fhi = at, f
			if side < 0 {
				flo /= 2
			}
			side = -1
		}
	}
	return at
}

// accept takes the step and reports whether the ascent is over.
func (r *run) accept(h float64) (ended bool) {
	r.stats.Steps++
	to := &r.to
	end := r.time + h
	if r.last-end < leastStep*r.last {
		end = r.last
	}
	r.addEnergy(h)
	now := r.state(to, end)
	if now.Supersaturation > r.peak.Supersaturation {
		r.peak, r.hasPeak = now, r.atPeak
	} else {
		r.hasPeak = true
	}
	over := r.opt.StopAtPeak && r.hasPeak && now.Supersaturation < r.peak.Supersaturation-r.bump()
	r.emit(h, end, over || end >= r.last)
	r.time = end
	r.from, r.to = r.to, r.from
	if f := r.opt.Progress; f != nil && (r.stats.Steps%reportEvery == 0 || end >= r.last) {
		f(end*r.updraft, r.opt.Height)
	}
	return over
}

// addEnergy adds what this step leaves of c_p dT + g dz - L dw_l, with the means of
// its ends.
func (r *run) addEnergy(h float64) {
	a, b := &r.from, &r.to
	heat := (r.heat(a) + r.heat(b)) / 2
	r.energy += heat*(b.T-a.T) + gravity*r.updraft*h*(r.weight(a)+r.weight(b))/2 - (a.latent+b.latent)/2*(b.liquid-a.liquid)
}

func (r *run) stopped(err error) error {
	return &StoppedError{State: r.state(&r.from, r.time), Steps: r.stats.Steps, Err: err}
}
