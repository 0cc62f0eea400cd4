package atmos

import "testing"

var sink float64

func BenchmarkVapourPressure(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = VapourPressure(283.15)
	}
}

func BenchmarkSurfaceTension(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = SurfaceTension(283.15)
	}
}

func BenchmarkWaterDensity(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = WaterDensity(283.15)
	}
}

func BenchmarkMobility(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = Mobility(1e-7, 1, 293.15, 101325)
	}
}

func BenchmarkDiameterFromMobility(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = DiameterFromMobility(2.665692e-8, 2, 293.15, 101325)
	}
}

func BenchmarkVolumeEquivalent(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = VolumeEquivalent(1e-7, 1.08, 293.15, 101325)
	}
}

func BenchmarkWaterNotes(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		WaterNotes(298.15)
	}
}
