package tensor

import "math"

// FullTangent is a fourth-order tensor with all its 81 components C_ijkl, indexed from 0. It serves to bring in or check a
// tensor from a derivation that works in indexes; the other types are for computing.
type FullTangent [3][3][3][3]float64

// Full returns all components of c.
func (c *Tangent) Full() FullTangent {
	var f FullTangent
	for i := range f {
		for j := range f[i] {
			for k := range f[i][j] {
				for l := range f[i][j][k] {
					f[i][j][k][l] = c[symIndex[i][j]][symIndex[k][l]]
				}
			}
		}
	}
	return f
}

// MinorPart sets c to the part of f with both minor symmetries, the mean of C_ijkl, C_jikl, C_ijlk and C_jilk. The rest is
// dropped without notice: MinorAsymmetry says how much it is. What Full returned comes back bit for bit, unless it holds
// infinities, whose difference is NaN.
func (c *Tangent) MinorPart(f *FullTangent) {
	for row, ij := range axes {
		i, j := ij[0], ij[1]
		for col, kl := range axes {
			k, l := kl[0], kl[1]
			c[row][col] = mean(mean(f[i][j][k][l], f[j][i][k][l]), mean(f[i][j][l][k], f[j][i][l][k]))
		}
	}
}

// MinorAsymmetry returns how far f is from having the two minor symmetries: the greatest of |C_ijkl - C_jikl| and
// |C_ijkl - C_ijlk|, divided by the greatest |C_ijkl|. It is 0 for a tensor that has them (and for the zero tensor), NaN when
// a component is NaN or infinite, and +Inf when a difference overflows.
func (f *FullTangent) MinorAsymmetry() float64 {
	var size, worst float64
	for i := range f {
		for j := range f[i] {
			for k := range f[i][j] {
				for l, v := range f[i][j][k] {
					size = max(size, math.Abs(v)) // max keeps a NaN
					worst = max(worst, math.Abs(v-f[j][i][k][l]), math.Abs(v-f[i][j][l][k]))
				}
			}
		}
	}
	return relativeTo(size, worst)
}

// relativeTo is worst/size, 0 for the zero tensor, and NaN for a size that is not finite.
func relativeTo(size, worst float64) float64 {
	switch {
	case size == 0:
		return 0
	case math.IsInf(size, 1):
		return math.NaN()
	}
	return worst / size
}
