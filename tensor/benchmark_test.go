package tensor_test

import (
	"math"
	"testing"

	"example.com/holdtime/tensor"
	"gonum.org/v1/gonum/mat"
)

// against runs op as the benchmark and reports its time as a multiple of base, which it times in the same run.
func against(b *testing.B, unit string, op, base func()) {
	b.ReportAllocs()
	n := min(b.N, 1_000_000) // the base may be slow
	for range n {
		base()
	}
	reference := float64(b.Elapsed()) / float64(n)
	b.ResetTimer()
	for range b.N {
		op()
	}
	b.ReportMetric(float64(b.Elapsed())/float64(b.N)/reference, unit)
}

var (
	benchStress = tensor.Sym{150, -20, 40, 35, 12, 60}
	sinkFloat   float64
	sinkSym     tensor.Sym
	sinkValues  [3]float64
)

// BenchmarkMises is in units of the textbook's way, the norm of the deviator.
func BenchmarkMises(b *testing.B) {
	against(b, "deviator-norms", func() { sinkFloat = benchStress.Mises() },
		func() { sinkFloat = math.Sqrt(1.5) * benchStress.Deviator().Norm() })
}

// BenchmarkPrincipalValues is in units of the same eigenvalues by gonum's EigenSym, its storage kept.
func BenchmarkPrincipalValues(b *testing.B) {
	m, values := mat.NewSymDense(3, dense3(benchStress).RawMatrix().Data), make([]float64, 3)
	against(b, "EigenSyms", func() { sinkValues = benchStress.PrincipalValues() }, func() {
		var eigen mat.EigenSym
		eigen.Factorize(m, false)
		eigen.Values(values)
	})
}

func BenchmarkPrincipal(b *testing.B) {
	m, vectors := mat.NewSymDense(3, dense3(benchStress).RawMatrix().Data), mat.NewDense(3, 3, nil)
	against(b, "EigenSyms", func() { sinkValues, _ = benchStress.Principal() }, func() {
		var eigen mat.EigenSym
		eigen.Factorize(m, true)
		eigen.VectorsTo(vectors)
	})
}

// BenchmarkRotate is in units of gonum's two products of 3×3 matrices, into storage kept.
func BenchmarkRotate(b *testing.B) {
	q, err := tensor.AxisAngle([3]float64{1, 2, 3}, 0.7)
	if err != nil {
		b.Fatal(err)
	}
	mq, ma, half, whole := rotationDense(q), dense3(benchStress), mat.NewDense(3, 3, nil), mat.NewDense(3, 3, nil)
	against(b, "dense-products", func() { sinkSym = benchStress.Rotate(q) }, func() {
		half.Mul(mq, ma)
		whole.Mul(half, mq.T())
	})
}

// BenchmarkContract is in units of gonum's 6×6 matrix times vector.
func BenchmarkContract(b *testing.B) {
	c := isotropic(160e3, 0.3)
	m, v, s := mat.NewDense(6, 6, flat(c)), mat.NewVecDense(6, benchStress[:]), mat.NewVecDense(6, nil)
	against(b, "dense-products", func() { sinkSym = c.Contract(benchStress) }, func() { s.MulVec(m, v) })
}

// BenchmarkHostBoundary is one point of a host: strain in, stress and tangent out, in units of copying as many numbers.
func BenchmarkHostBoundary(b *testing.B) {
	l := mustLayout(b, "xx yy zz xy yz xz", tensor.EngineeringShear)
	c := isotropic(160e3, 0.3)
	strain, stress, tangent := make([]float64, 6), make([]float64, 6), make([]float64, 36)
	source := flat(c)
	against(b, "copies", func() {
		l.StressOut(stress, l.StrainIn(strain))
		l.TangentOut(tangent, &c)
	}, func() {
		copy(stress, strain)
		copy(tangent, source)
	})
}
