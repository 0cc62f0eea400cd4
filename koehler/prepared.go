package koehler

// Prepared is a particle made ready to be asked at many sizes: everything that
// depends on the temperature only is computed once.
type Prepared struct{ c curve }

// Terms are the two parts of ln S over a drop with their derivatives by ln u.
type Terms struct {
	WetDiameter   float64 // m
	LnActivity    float64
	ActivitySlope float64
	LnKelvin      float64 // ln S less LnActivity
	KelvinSlope   float64
}

// Prepare makes the particle ready. An error wraps ErrInput.
func (p Particle) Prepare() (Prepared, error) {
	if err := p.Check(); err != nil {
		return Prepared{}, err
	}
	return Prepared{p.ready()}, nil
}

// Terms returns the parts of ln S over the drop that holds u volumes of water per
// dry volume, u > 0.
func (p *Prepared) Terms(u float64) Terms {
	t := p.c.at(u)
	return Terms{t.wet, t.lnaw, t.byActivity, t.lnS - t.lnaw, t.slope - t.activitySlope}
}
