package fieldfile_test

import (
	"fmt"
	"io"
	"os"
	"strings"
	"time"

	"dropcrest/ui/fieldfile"
)

func Example() {
	text := "time,N_0p3 (cm-3),T (C)\n2026-03-14T08:00:00Z,512,21.5\n2026-03-14T09:00:00Z,<5,\n"
	f, err := fieldfile.Open("counts.csv", strings.NewReader(text), fieldfile.Options{})
	if err != nil {
		fmt.Println(err)
		return
	}
	// nothing in the names tells what N and T are: say it
	if err := f.Use("N_* (cm-3)=ccn @*%", "T (C)=temperature"); err != nil {
		fmt.Println(err)
		return
	}
	fmt.Println(strings.Join(f.Mapping(), "\n"))
	var rec fieldfile.Record
	for err = f.Read(&rec); err == nil; err = f.Read(&rec) {
		fmt.Println(rec.Start.Format(time.TimeOnly), rec.Cells[1], rec.Cells[2])
	}
	fmt.Println(err == io.EOF)
	// Output:
	// time=time in iso
	// N_0p3 (cm-3)=ccn @0.3% in cm-3
	// T (C)=temperature in C
	// 08:00:00 {5.12e+08 value} {294.65 value}
	// 09:00:00 {5e+06 below limit} {0 missing}
	// true
}

func ExampleMerge() {
	var sources []fieldfile.Source
	for _, name := range []string{"ccn-counts_demo-station_20260314_R0.ict", "sizes.nas", "station.csv"} {
		file, err := os.Open("../../testdata/demo/" + name)
		if err != nil {
			fmt.Println(err)
			return
		}
		defer file.Close()
		f, err := fieldfile.Open(name, file, fieldfile.Options{})
		if err != nil {
			fmt.Println(err)
			return
		}
		sources = append(sources, fieldfile.Source{Samples: f.Samples()})
	}
	var s fieldfile.Sample
	if err := fieldfile.Merge(fieldfile.Merging{Every: time.Hour}, sources...).Next(&s); err != nil {
		fmt.Println(err)
		return
	}
	fmt.Printf("%s to %s: %d sizes, %.1f °C\n", s.Start.Format(time.TimeOnly), s.End.Format(time.TimeOnly), len(s.Sizes), s.Values[fieldfile.Temperature].X-273.15)
	for _, c := range s.Counts {
		fmt.Printf("%.1f %%: %.0f cm⁻³\n", 100*c.At(), c.N.X/1e6)
	}
	// Output:
	// 00:00:00 to 01:00:00: 40 sizes, 5.9 °C
	// 0.1 %: 197 cm⁻³
	// 0.2 %: 457 cm⁻³
	// 0.4 %: 657 cm⁻³
	// 0.6 %: 767 cm⁻³
	// 1.0 %: 914 cm⁻³
}
