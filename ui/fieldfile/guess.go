package fieldfile

import (
	"errors"
	"slices"
	"strings"
)

// guess says what each column holds, from names, standard names, units and
// texts. What cannot be told stays unused and is noted with what to say.
func (f *File) guess() []Role {
	roles := make([]Role, len(f.Columns))
	taken := map[Role]int{}
	for i := range f.Columns {
		r, ask := f.guessColumn(&f.Columns[i])
		if f.Format != CSV && i == 0 {
			r.Quantity, ask = firstTime(r.Quantity), ""
			r.Unit = f.Columns[i].time
			if r.Unit == "" {
				r.Quantity, ask = Unused, "in which unit the times are: "+Time.String()+" in days since 2026-03-14"
			}
		}
		if ask != "" {
			f.asks = append(f.asks, question{i, ask})
			r = Role{}
		}
		if r.Quantity == Unused || r.Quantity == Flag {
			if slices.Contains(f.flagColumns, i) {
				roles[i] = r
			}
			continue
		}
		same := Role{Quantity: r.Quantity, At: r.At}
		if first, ok := taken[same]; ok {
			f.notes.add("second", 0, "columns %s and %s both look like %s: the first is used", quoted(f.Columns[first].Name), quoted(f.Columns[i].Name), r.Quantity)
			continue
		}
		taken[same] = i
		roles[i] = r
	}
	f.askForNumbers(roles)
	return f.oneClock(roles)
}

// askForNumbers: columns called by numbers are likely the sizes of bins, but a
// number alone has no unit.
func (f *File) askForNumbers(roles []Role) {
	const fewest = 3
	n := 0
	for i, c := range f.Columns {
		if _, ok := number([]byte(c.Name)); ok && roles[i].Quantity == Unused {
			n++
		}
	}
	if n >= fewest {
		f.notes.add("ask_sizes", 0, "%d columns called by numbers are not used: if they are sizes say *=%s @*nm in cm-3", n, PerLogDiameter)
	}
}

// firstTime makes a time of the independent variable, whatever its name.
func firstTime(q Quantity) Quantity {
	if q.IsTime() {
		return q
	}
	return Time
}

// oneClock leaves a single stamp out where start and end are there, and a middle
// where there is a start.
func (f *File) oneClock(roles []Role) []Role {
	has := func(q Quantity) bool {
		return slices.ContainsFunc(roles, func(r Role) bool { return r.Quantity == q })
	}
	start := has(StartTime)
	for i := range roles {
		if start && (roles[i].Quantity == Time || roles[i].Quantity == MidTime) {
			roles[i] = Role{}
		}
	}
	return roles
}

// rule is one guess: the words that all have to be there, those that must not,
// and what the column holds then. A word that starts with = is a whole token.
type rule struct {
	all, not string
	quantity Quantity
}

// rules are tried in this order. Names in the first lines are standard names of
// CF and parameters of EBAS; the rest is common practice.
var rules = []rule{
	{"numflag", "", Flag},
	{"=ccn counted", "", CCNCounted},
	{"cloud_condensation_nuclei", "log10", CCN},
	{"=ccn", "temp flow pressure size", CCN},
	{"=nccn", "temp flow pressure size", CCN},
	{"supersaturation =set", "", SupersaturationSet},
	{"supersaturation setpoint", "", SupersaturationSet},
	{"supersaturation nominal", "", SupersaturationSet},
	{"supersaturation", "", Supersaturation},
	{"=ss =set", "", SupersaturationSet},
	{"=ss", "", Supersaturation},
	{"particle_number_size_distribution", "", PerLogDiameter},
	{"log10_size_interval_based_number_size_distribution", "", PerLogDiameter},
	{"dndlog", "", PerLogDiameter},
	{"dn/dlog", "", PerLogDiameter},
	{"dndln", "", PerLnDiameter},
	{"dn/dln", "", PerLnDiameter},
	{"=cn counted", "", CNCounted},
	{"particle_number_concentration", "", CN},
	{"number_concentration_of_aerosol_particles", "", CN},
	{"=cn", "", CN},
	{"=cpc", "temp flow pressure", CN},
	{"sulfate", "", Sulfate}, {"sulphate", "", Sulfate}, {"=so4", "", Sulfate},
	{"nitrate", "", Nitrate}, {"=no3", "", Nitrate},
	{"ammonium", "", Ammonium}, {"=nh4", "", Ammonium},
	{"chloride", "", Chloride}, {"=chl", "", Chloride},
	{"elemental_carbon", "", BlackCarbon}, {"black_carbon", "", BlackCarbon}, {"black carbon", "", BlackCarbon}, {"=ebc", "", BlackCarbon}, {"=bc", "", BlackCarbon},
	{"organic", "inorganic", Organic}, {"=org", "", Organic},
	{"kappa", "", Kappa},
	{"growth_factor", "", GrowthFactor}, {"growth factor", "", GrowthFactor}, {"=gf", "", GrowthFactor},
	{"temperature_difference", "", TemperatureDifference}, {"temperature difference", "", TemperatureDifference}, {"delta =t", "", TemperatureDifference},
	{"sheath flow", "", SheathFlow}, {"sample flow", "", SampleFlow},
	{"lower diameter", "", LowerDiameter}, {"upper diameter", "", UpperDiameter},
	{"diameter", "wet ambient_aerosol", Diameter}, {"=dp", "", Diameter},
	{"relative_humidity", "", RelativeHumidity}, {"relative humidity", "", RelativeHumidity}, {"=rh", "", RelativeHumidity},
	{"upward_air_velocity", "", Updraft}, {"updraft", "", Updraft},
	{"temperature", "stable dew set", Temperature}, {"=temp", "", Temperature},
	{"pressure", "vapour vapor", Pressure},
	{"sampling_time", "", SamplingTime}, {"sampling time", "", SamplingTime},
	{"=salt", "", Salt},
	{"=status", "", Status}, {"=stable", "", Status},
}

// uncertaintyRules are for columns that are called an uncertainty.
var uncertaintyRules = []rule{
	{"cloud_condensation_nuclei", "", CCNUncertainty}, {"=ccn", "", CCNUncertainty},
	{"supersaturation", "", SupersaturationUncertainty}, {"=ss", "", SupersaturationUncertainty},
	{"particle_number_concentration", "", CNUncertainty}, {"=cn", "", CNUncertainty},
}

// rulesFor chooses the rules by what the column's name says it is of a quantity.
// The long name does not count: "CCN, uncertainty 10 %" is the value. A spread,
// such as a standard deviation or a percentile, is not used.
func rulesFor(c *Column) []rule {
	statistics := strings.ToLower(c.Tags["Statistics"])
	tokens := tokensOf(strings.ToLower(c.Name + " " + c.Standard + " " + statistics))
	has := func(words ...string) bool {
		return slices.ContainsFunc(words, func(w string) bool { return slices.Contains(tokens, w) })
	}
	switch {
	case has("uncertainty", "unc"):
		return uncertaintyRules
	case has("std", "stdev", "stddev", "sd", "deviation", "sigma", "error", "variance", "percentile"):
		return nil
	case statistics != "" && statistics != "arithmetic mean" && statistics != "median":
		return nil
	}
	return rules
}

// timeRules tell the stamps apart.
var timeRules = []rule{
	{"start_time", "", StartTime}, {"time_start", "", StartTime}, {"starttime", "", StartTime}, {"start time", "", StartTime}, {"time start", "", StartTime},
	{"end_time", "", EndTime}, {"time_end", "", EndTime}, {"time_stop", "", EndTime}, {"endtime", "", EndTime}, {"end time", "", EndTime}, {"time stop", "", EndTime},
	{"mid_time", "", MidTime}, {"time_mid", "", MidTime}, {"mid time", "", MidTime},
	{"=time", "sampling", Time}, {"=datetime", "", Time}, {"=timestamp", "", Time}, {"=date_time", "", Time}, {"=utc", "", Time},
}

// guessColumn guesses one column; ask is what the user would have to say.
func (f *File) guessColumn(c *Column) (r Role, ask string) {
	all := strings.ToLower(c.Name + " | " + c.Standard + " | " + c.Long)
	tokens := tokensOf(all)
	if q := apply(timeRules, all, tokens); q != Unused && c.Tags == nil {
		return f.guessTime(c, q)
	}
	q := apply(rulesFor(c), all, tokens)
	if exact, ok := f.ownName(c); ok {
		q = exact
	}
	if q == Unused || q == Flag {
		return Role{Quantity: q}, ""
	}
	r = Role{Quantity: q, Unit: c.Unit, Basis: basisOf(all)}
	d := declared[q]
	if d.kind != asNumber {
		r.Unit, r.Basis = "", Unstated
		return r, ""
	}
	switch {
	case d.dim != concentration:
		r.Basis = Unstated
	case r.Basis == Unstated:
		r.Basis = f.ebasBasis(q)
	}
	if d.at != nowhere {
		r = f.placed(c, r)
	}
	if err := r.check(); err != nil {
		if errors.Is(err, errNoUnit) {
			return r, c.Name + "=" + r.String() + " in " + d.dim.shown + " (or another unit)"
		}
		f.notes.add("unit", 0, "column %s is not used: %s", quoted(c.Name), err)
		return Role{}, ""
	}
	if q.IsSize() && r.At == 0 && !f.has(length) {
		return r, "the diameter: " + c.Name + "=" + q.String() + " @50nm in " + orShown(r.Unit, d.dim)
	}
	return r, ""
}

func orShown(u string, d *dimension) string {
	if u == "" {
		return d.shown
	}
	return u
}

// ownName recognises the names that this program writes: the quantity's key and
// then where and in which unit.
func (f *File) ownName(c *Column) (Quantity, bool) {
	name, _, _ := strings.Cut(c.Name, "_at_")
	name = strings.TrimSuffix(strings.TrimSuffix(name, suffixOf(name)), "_stp")
	return quantityOf(name)
}

func (f *File) guessTime(c *Column, q Quantity) (Role, string) {
	switch {
	case c.time != "":
		return Role{Quantity: q, Unit: c.time}, ""
	case f.Format != CSV:
		return Role{}, ""
	case c.Unit == "" || isoNames[strings.ToLower(c.Unit)]:
		return Role{Quantity: q, Unit: isoUnit}, ""
	}
	return Role{Quantity: q}, "since when the times count: " + c.Name + "=" + q.String() + " in seconds since 2026-03-14"
}

// isoNames stand in brackets behind a time in words.
var isoNames = map[string]bool{"utc": true, "iso": true, "iso 8601": true, "iso8601": true, "z": true, "gmt": true}

// has reports whether some column is in a unit of that dimension and called a
// diameter: then the layout is long.
func (f *File) has(d *dimension) bool {
	return slices.ContainsFunc(f.Columns, func(c Column) bool {
		_, ok := d.unit(c.Unit)
		name := strings.ToLower(c.Name + " " + c.Standard)
		return ok && (strings.Contains(name, "diameter") || slices.Contains(tokensOf(name), "dp"))
	})
}

func apply(list []rule, all string, tokens []string) Quantity {
	has := func(word string) bool {
		if exact, ok := strings.CutPrefix(word, "="); ok {
			return slices.Contains(tokens, exact)
		}
		return strings.Contains(all, word)
	}
	for _, r := range list {
		if slices.ContainsFunc(strings.Fields(r.not), has) {
			continue
		}
		fits := true
		for _, word := range strings.Fields(r.all) {
			fits = fits && has(word)
		}
		if fits {
			return r.quantity
		}
	}
	return Unused
}

// tokensOf parts a text at everything but letters, and at the border of letters
// and digits; so4, no3 and nh4 stay.
func tokensOf(text string) []string {
	var out []string
	for _, word := range strings.FieldsFunc(text, func(r rune) bool {
		return !('a' <= r && r <= 'z') && !('0' <= r && r <= '9')
	}) {
		out = append(out, word, strings.TrimRight(word, "0123456789"))
	}
	return out
}

// basisOf finds what a text says on the state of the air.
func basisOf(all string) Basis {
	tokens := tokensOf(all)
	switch {
	case strings.Contains(all, "at_stp"), slices.Contains(tokens, "stp"), strings.Contains(all, "273.15 k"):
		return Standard
	case slices.Contains(tokens, "ambient"):
		return Ambient
	}
	return Unstated
}
