package counter

import (
	"testing"
)

func BenchmarkFitScan30(b *testing.B) {
	s := usual(60e-9, 0.05).scan(1, 1)
	b.ReportAllocs()
	for b.Loop() {
		FitScan(s, Options{})
	}
}

func BenchmarkResample(b *testing.B) {
	f, err := FitScan(usual(60e-9, 0.05).scan(1, 1), Options{})
	if err != nil {
		b.Fatal(err)
	}
	i := 0
	b.ReportAllocs()
	for b.Loop() {
		f.resample(1, 0, i)
		i++
	}
}

func BenchmarkCalibrate10x30Bootstrap1000(b *testing.B) {
	r := Request{Scans: campaign(b, 10, 30, 3), Standards: []Standard{sulfate(b)}, Bootstrap: 1000, Seed: 1}
	b.ReportAllocs()
	for b.Loop() {
		calibrate(b, r)
	}
}

func BenchmarkYork10(b *testing.B) {
	points := pearson()
	b.ReportAllocs()
	for b.Loop() {
		York(points)
	}
}
