package batch

import "fmt"

// checkLengths returns the number of points, and panics where an array does not fit it.
func (b *Batch) checkLengths(p *Points) (n int) {
	size := b.layout.Len()
	if len(p.Strain)%size != 0 {
		panic(fmt.Sprintf("batch: Strain has length %d, want a multiple of %d", len(p.Strain), size))
	}
	n = len(p.Strain) / size
	if t := len(p.Temperature); t != n && t != 1 {
		panic(fmt.Sprintf("batch: Temperature has length %d, want 1 or %d", t, n))
	}
	checkLength("Old", len(p.Old), n*b.stride)
	checkLength("Stress", len(p.Stress), n*size)
	checkLength("State", len(p.State), n*b.stride)
	if p.Material != nil {
		checkLength("Material", len(p.Material), n)
	}
	if p.Tangent != nil {
		checkLength("Tangent", len(p.Tangent), n*size*size)
	}
	if p.ByTemperature != nil {
		checkLength("ByTemperature", len(p.ByTemperature), n*size)
	}
	return n
}

func checkLength(name string, got, want int) {
	if got != want {
		panic(fmt.Sprintf("batch: %s has length %d, want %d", name, got, want))
	}
}
