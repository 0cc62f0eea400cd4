package atmos

import "testing"

var (
	sink  float64
	warmT = 283.15 // variables, so that nothing is computed at compile time
	size  = 1e-7
)

func BenchmarkVapourPressure(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = VapourPressure(warmT)
	}
}

func BenchmarkSurfaceTension(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = SurfaceTension(warmT)
	}
}

func BenchmarkWaterDensity(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = WaterDensity(warmT)
	}
}

func BenchmarkMobility(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = Mobility(size, 1, warmT, 101325)
	}
}

func BenchmarkDiameterFromMobility(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = DiameterFromMobility(2.665692e-8, 2, warmT, 101325)
	}
}

func BenchmarkVolumeEquivalent(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		sink = VolumeEquivalent(size, 1.08, warmT, 101325)
	}
}

func BenchmarkWaterNotes(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		WaterNotes(warmT)
	}
}
