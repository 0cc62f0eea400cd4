package fieldfile

import (
	"slices"
	"strings"
	"testing"
)

func TestRoleTextComesBack(t *testing.T) {
	for _, text := range []string{"ccn @0.3% in cm-3 at stp", "ccn in 1/cm3", "dN/dlog10D @50.3nm in cm-3", "dN/dlog10D @45.2..50.1nm in #/cm3 at ambient",
		"dN @12nm in m-3", "start_time in days since 2026-03-14", "time in iso", "mid_time in day of year 2026", "temperature in C", "kappa", "salt", "unused",
		"number in furlongs", "supersaturation in %", "pressure in hPa", "organic in ug/m3", "ccn_counted @0.05%", "flag"} {
		r, err := ParseRole(text)
		if err != nil {
			t.Errorf("%q: %v", text, err)
			continue
		}
		if r.String() != text {
			t.Errorf("%q comes back as %q", text, r.String())
		}
	}
	r, _ := ParseRole("ccn @0.3 % in cm-3")
	if r.At != 0.003 {
		t.Errorf("0.3 %% is %v", r.At)
	}
	if r, _ = ParseRole("dN/dlog10D @0.05um in cm-3"); short(r.At*1e9) != "50" {
		t.Errorf("0.05 um is %v", r.At)
	}
}

func TestRoleErrors(t *testing.T) {
	for text, want := range map[string]string{
		"":                       "no quantity",
		"capa":                   `no quantity "capa"`,
		"temprature in K":        "temperature?",
		"ccn @0.3":               "want @0.3%",
		"ccn @0% in cm-3":        "want @0.3%",
		"ccn @50nm in cm-3":      "want @0.3%",
		"dN @60..50nm in cm-3":   "want @50nm or @45..55nm",
		"kappa @3%":              "want kappa without @",
		"ccn @0.3% in K":         "no unit of number concentration: want a unit of number concentration such as cm-3",
		"ccn @0.3%":              "ccn has no unit: want",
		"time in seconds":        `want "iso", "seconds since`,
		"ccn in cm-3 at the sea": "want stp or ambient",
		"kappa in cm-3":          "want no unit",
	} {
		if r, err := ParseRole(text); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: got %v %v, want %q", text, r, err, want)
		}
	}
}

func TestUse(t *testing.T) {
	text := "t,N_10,N_20p5,N_x,c (cm-3),salt,a=b\n0,1,2,3,4,NaCl,7\n86400,1,2,3,4,\"(NH4)2SO4\",8\n"
	f := open(t, text)
	if err := f.Use("t=start_time in seconds since 2026-03-14", "N_*=dN/dlog10D @*nm in cm-3 at stp", "c (cm-3)=ccn @0.2%", "salt=salt", "a=b=kappa"); err != nil {
		t.Fatal(err)
	}
	want := []string{"t=start_time in seconds since 2026-03-14", "N_10=dN/dlog10D @10nm in cm-3 at stp", "N_20p5=dN/dlog10D @20.5nm in cm-3 at stp",
		"c (cm-3)=ccn @0.2% in cm-3", "salt=salt", "a=b=kappa"}
	if got := f.Mapping(); !slices.Equal(got, want) {
		t.Errorf("mapping %q, want %q", got, want)
	}
	again := open(t, text)
	if err := again.Use(f.Mapping()...); err != nil || !slices.Equal(again.Mapping(), want) {
		t.Errorf("used again: %q, %v", again.Mapping(), err)
	}
	before := f.Mapping()
	for line, want := range map[string]string{"c (cm-3)": "want column=quantity", "d=kappa": `no column "d"`, "slat=salt": "salt?", "a=b=capa": "no quantity", "t=cn": "cn has no unit", "t=flag": "holds no flags"} {
		if err := f.Use("salt=unused", line); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%q: %v, want %q", line, err, want)
		}
	}
	if !slices.Equal(f.Mapping(), before) {
		t.Error("a failed Use changed the mapping")
	}
	got := all(t, f)
	if got[0].Text[5] != "NaCl" || got[1].Text[5] != "(NH4)2SO4" || got[1].Cells[6].X != 8 || got[1].Start.Day() != 15 {
		t.Errorf("got %v", got)
	}
	if err := f.Use("salt="); err != nil || len(f.Mapping()) != 5 {
		t.Errorf("salt is not dropped: %v %q", err, f.Mapping())
	}
}

func TestNames(t *testing.T) {
	f := open(t, "time,N_10,a=b\n2026-03-14T00:00:00Z,1,2\n")
	for line, want := range map[string]bool{"N_10=cn in cm-3": true, " N_* =nonsense": true, "a=b=kappa": true, "a=kappa": false, "n_10=cn": false, "N_10": false, "": false} {
		if got := f.Names(line); got != want {
			t.Errorf("%q names a column: %v, want %v", line, got, want)
		}
	}
}

func TestGuess(t *testing.T) {
	for name, want := range map[string]string{ // a CSV name and its role
		"time":       "time in iso",
		"Time (UTC)": "time in iso",
		"start_time": "start_time in iso",
		"time (seconds since 2026-03-14 00:00:00)": "time in seconds since 2026-03-14 00:00:00",
		"ccn_at_0.3_percent_per_m3":                "ccn @0.3% in 1/m3",
		"CCN 0.3% [#/cc]":                          "ccn @0.3% in #/cc",
		"N_CCN_0.25 (cm-3)":                        "ccn @0.25% in cm-3",
		"ccn_stp_per_cm3":                          "ccn in 1/cm3 at stp",
		"SS_set (%)":                               "supersaturation_set in %",
		"supersaturation_percent":                  "supersaturation in percent",
		"number_concentration_of_cloud_condensation_nuclei_at_stp_in_air (m-3)": "ccn in m-3 at stp",
		"dNdlogDp_50.3nm (cm-3)":     "dN/dlog10D @50.3nm in cm-3",
		"dN/dlogDp 45-55 nm (cm-3)":  "dN/dlog10D @45..55nm in cm-3",
		"dN/dlnDp 0.05 um (cm-3)":    "dN/dlnD @50nm in cm-3",
		"dN/dlog10D_at_50_nm_per_m3": "dN/dlog10D @50nm in 1/m3",
		"CPC (cm-3)":                 "cn in cm-3",
		"number_concentration_of_aerosol_particles_in_air (cm-3)": "cn in cm-3",
		"air_temperature (K)": "temperature in K",
		"T_degC":              "",
		"temperature_c":       "temperature in c",
		"pressure (mbar)":     "pressure in mbar",
		"RH (%)":              "relative_humidity in %",
		"kappa":               "kappa",
		"SO4 (ug/m3)":         "sulfate in ug/m3",
		"Org (µg m-3)":        "organic in µg m-3",
		"eBC (ng/m3)":         "black_carbon in ng/m3",
		"mass_concentration_of_nitrate_dry_aerosol_particles_in_air (kg m-3)": "nitrate in kg m-3",
		"updraft (m/s)":              "updraft in m/s",
		"temperature_difference (K)": "temperature_difference in K",
		"dry diameter (nm)":          "diameter in nm",
		"sample flow (L/min)":        "sample_flow in L/min",
		"growth factor":              "growth_factor",
		"salt":                       "salt",
		"CCN (cm-3)":                 "ccn in cm-3",
		"CCN_030 (cm-3)":             "ccn in cm-3", // 0.30 or 30: not guessed
		"cn":                         "",            // no unit: asked for
		"CCN temperature (C)":        "temperature in C",
		"CCN_0.3_uncertainty (cm-3)": "ccn_uncertainty @0.3% in cm-3",
		"kappa stdev":                "", "kappa uncertainty": "", "ccn sigma (cm-3)": "", "inorganic (ug/m3)": "",
		"nonsense":   "",
		"timeliness": "",
	} {
		quoted := `"` + strings.ReplaceAll(name, `"`, `""`) + `",x` + "\n"
		f := open(t, quoted)
		got := ""
		if m := f.Mapping(); len(m) > 0 {
			got = strings.TrimPrefix(m[0], f.Columns[0].Name+"=")
		}
		if got != want {
			t.Errorf("%s: guessed %q, want %q", name, got, want)
		}
	}
}

// Sizes as bare numbers: the unit is asked for, and one line answers.
func TestColumnsCalledByNumbers(t *testing.T) {
	f := open(t, "time,10.5,20,40\n2026-03-14,1,2,3\n")
	if !noted(f, "ask_sizes") || len(f.Mapping()) != 1 {
		t.Errorf("notes %v, mapping %q", f.Notes(), f.Mapping())
	}
	if err := f.Use("*=dN/dlog10D @*nm in cm-3"); err != nil {
		t.Fatal(err)
	}
	if got := samples(t, f)[0]; len(got.Bins) != 3 || !alike(got.Bins[0].Diameter, 10.5e-9) || got.Sizes[2].X != 3e6 {
		t.Errorf("got %+v", got)
	}
}

// The long name may speak of the uncertainty of the value.
func TestTheLongNameIsNoUncertainty(t *testing.T) {
	lines := icarttFile()
	lines[13] = "CCN, cm-3, , CCN at 0.30 % supersaturation, uncertainty 10 %"
	if got := open(t, byLines(lines)).Mapping()[2]; got != "CCN=ccn @0.3% in cm-3" {
		t.Errorf("mapped as %q", got)
	}
}

// What the guess says can be told again and means the same.
func TestGuessIsItsOwnMapping(t *testing.T) {
	f := open(t, byLines(icarttFile()))
	before := f.Mapping()
	if err := f.Use(before...); err != nil || !slices.Equal(before, f.Mapping()) {
		t.Errorf("%q becomes %q: %v", before, f.Mapping(), err)
	}
}
