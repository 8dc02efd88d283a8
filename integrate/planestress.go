package integrate

import (
	"math"

	"example.com/holdtime/tensor"
)

// PlaneStressIncrement is one step of a sheet in the plane xy whose strains in that plane are prescribed; its faces are free
// of stress.
type PlaneStressIncrement struct {
	Dt          float64    // Δt: length of the step [time], >= 0
	Strain      tensor.Sym // ε at the end of the step [-], tensor shear; xx, yy and xy are read, the rest is ignored
	Temperature float64    // T: absolute temperature at the end of the step [K], > 0
}

// PlaneStressResult is what a step of a sheet gives back.
//
// Tangent holds tensor components in the order xx, yy, xy, like tensor.Tangent: as a matrix it maps a strain with engineering
// shear γ_xy = 2ε_xy to the stress, and is symmetric. A host whose shear strain is the tensor component doubles the third
// column. Spread hands it to a tensor.Layout, which does that.
type PlaneStressResult struct {
	Stress        tensor.Sym    // σ at the end of the step [stress]; zz, yz and xz are zero
	Strain        tensor.Sym    // ε at the end of the step [-]: xx, yy, xy as prescribed, zz the thickness strain
	State         State         // the state at the end of the step
	Tangent       [3][3]float64 // ∂σ/∂ε of the discrete update with the thickness free [stress]
	ByTemperature tensor.Sym    // ∂σ/∂T of the discrete update at fixed strain in the plane [stress/K]
	CreepStep     float64       // Δp: equivalent creep strain of the step [-]
	PlasticStep   float64       // Δκ: equivalent plastic strain of the step [-]; 0 without plasticity or yielding
	Iterations    int           // corrections the scalar solve made
	Residual      float64       // what it left in ln Δp, relative to the law; 0 for an elastic step
}

// Spread writes the tangent to the rows and columns xx, yy and xy of c and zero to the rest.
func (r *PlaneStressResult) Spread(c *tensor.Tangent) {
	*c = tensor.Tangent{}
	at := [3]int{tensor.XX, tensor.YY, tensor.XY}
	for i := range at {
		for j := range at {
			c[at[i]][at[j]] = r.Tangent[i][j]
		}
	}
}

// StepPlaneStress carries a sheet from the state old through an increment of its strains in the plane. Stress, creep strain
// and time obey the backward Euler rule of Step with σ_zz = σ_yz = σ_xz = 0. Sum and difference of the normal stresses and
// the shear stress then relax apart, and with Δεc = λ s one equation in ω = 2Gλ is left:
//
//	σ₊ = σ_xx + σ_yy = σ₊(trial)/(1 + μω),   μ = (1+ν)/(3(1-ν))
//	σ₋ = σ_xx - σ_yy = σ₋(trial)/(1 + ω),    σ_xy = σ_xy(trial)/(1 + ω)
//	σₑ² = ¼σ₊² + ¾σ₋² + 3σ_xy²,              Δp = ω σₑ/3G = Δt ṗ(σₑ, p₀+Δp, T)
//
// The state is that of Step: a point may change between the entry points. Any step size is accepted; nothing is allocated.
// With internal variables or plasticity the step goes through StepMixed, at several times the cost.
//
// The error is nil or a Code; then out is untouched. old is never written, but may be &out.State.
func (m *Material) StepPlaneStress(out *PlaneStressResult, old *State, inc PlaneStressIncrement) error {
	if code := m.stepPlaneStress(out, old, &inc); code != 0 {
		return code
	}
	return nil
}

func (m *Material) stepPlaneStress(out *PlaneStressResult, old *State, inc *PlaneStressIncrement) Code {
	if m.throughStep() {
		return m.bridgePlaneStress(out, old, inc)
	}
	t := m.sheetAt(old, inc)
	if !(t.ok && inc.Dt >= 0 && finite(inc.Dt) && old.valid()) {
		return sheetRefusal(old, inc)
	}
	x := flowed{strain: old.Equivalent, kept: 1}
	problem := m.newFlow(old, inc.Temperature)
	if inc.Dt > 0 && t.square > 0 {
		problem.add(0.25*t.sum*t.sum, t.pace)
		problem.add(0.75*t.difference*t.difference+3*t.shearStress*t.shearStress, 1)
		problem.scale(3*t.shear, inc.Dt)
		if code := problem.solve(&x); code != 0 {
			return code
		}
	} else {
		x.stress = math.Sqrt(t.square)
	}
	slope, h := 1.0, 1.0
	if x.odds != 0 {
		h = problem.stiffening(&x)
		slope = problem.slope(&x)
		if !(slope > 0) {
			return BeyondRupture
		}
	}
	out.write(old, inc, &t, &x)
	out.derive(&t, &x, h, slope, inc.Temperature)
	return 0
}

// sheet is the trial state of a step in plane stress: all of the increment taken as elastic.
type sheet struct {
	moduli
	sum, difference, shearStress float64 // σ₊, σ₋, σ_xy
	square                       float64 // q²
	sumModulus                   float64 // E/(1-ν)
	pace                         float64 // μ of σ₊
	free, freeByT                float64 // εₜ, dεₜ/dT
	ok                           bool
}

func (m *Material) sheetAt(old *State, inc *PlaneStressIncrement) sheet {
	t := sheet{moduli: m.moduliAt(inc.Temperature)}
	t.free, t.freeByT = m.freeStrain(inc.Temperature)
	t.pace = 3 * t.bulk / (3*t.bulk + 4*t.shear)
	t.sumModulus = 6 * t.shear * t.pace
	xx, yy := inc.Strain[tensor.XX]-old.Creep[tensor.XX], inc.Strain[tensor.YY]-old.Creep[tensor.YY]
	t.sum = t.sumModulus * ((xx - t.free) + (yy - t.free))
	t.difference = 2 * t.shear * (xx - yy)
	t.shearStress = 2 * t.shear * (inc.Strain[tensor.XY] - old.Creep[tensor.XY])
	t.square = 0.25*t.sum*t.sum + 0.75*t.difference*t.difference + 3*t.shearStress*t.shearStress
	t.ok = t.bulk > 0 && t.shear > 0 && finite(t.square) && inc.Temperature > 0 && finite(inc.Temperature)
	return t
}

// write sets stress, strain and state. old may be &out.State.
func (out *PlaneStressResult) write(old *State, inc *PlaneStressIncrement, t *sheet, x *flowed) {
	state := *old
	flow := x.odds / (2 * t.shear) // λ
	sum, difference := t.sum/(1+t.pace*x.odds), t.difference/(1+x.odds)
	shear := t.shearStress / (1 + x.odds)
	state.Creep[tensor.XX] += flow * (sum/6 + difference/2)
	state.Creep[tensor.YY] += flow * (sum/6 - difference/2)
	state.Creep[tensor.ZZ] -= flow * (sum / 3)
	state.Creep[tensor.XY] += flow * shear
	state.Equivalent += x.creep
	out.State = state
	out.CreepStep, out.PlasticStep = x.creep, 0
	out.Stress = tensor.Sym{tensor.XX: (sum + difference) / 2, tensor.YY: (sum - difference) / 2, tensor.XY: shear}
	out.Strain = state.Creep
	out.Strain[tensor.XX], out.Strain[tensor.YY] = inc.Strain[tensor.XX], inc.Strain[tensor.YY]
	out.Strain[tensor.ZZ] += t.free - sum*(1/(6*t.shear)-1/(9*t.bulk))
	out.Strain[tensor.XY] = inc.Strain[tensor.XY]
	out.Iterations, out.Residual = x.iterations, x.residual
}

// derive fills the derivatives: at fixed ω the update is linear, and δω follows from the scalar equation,
//
//	δz = [(n-h) (δ ln σₑ at fixed ω) + ...]/F',   ∂σ/∂z = -ω g,   ∂σₑ/∂ε at fixed ω = 3G g/σₑ (with the trial's strain).
func (out *PlaneStressResult) derive(t *sheet, x *flowed, h, slope, temperature float64) {
	slow, fast := 1/(1+t.pace*x.odds), 1/(1+x.odds)
	alongSum, alongDifference := t.sumModulus*slow, 2*t.shear*fast
	c := &out.Tangent
	c[0][0] = (alongSum + alongDifference) / 2
	c[0][1] = (alongSum - alongDifference) / 2
	c[0][2], c[1][2] = 0, 0
	c[1][1] = c[0][0]
	c[2][2] = t.shear * fast
	var g [3]float64 // over σₑ
	sum, difference, shear := t.sum*slow, t.difference*fast, t.shearStress*fast
	n := x.rate.ByLogStress
	if x.odds != 0 {
		p, d := t.pace*slow*(sum/x.stress), fast*(difference/x.stress)
		g = [3]float64{(p + d) / 2, (p - d) / 2, fast * (shear / x.stress)}
		along := -3 * t.shear * x.odds * (n - h) / slope
		for i := range g {
			for j := i; j < 3; j++ {
				c[i][j] += along * g[i] * g[j]
			}
		}
	}
	c[1][0], c[2][0], c[2][1] = c[0][1], c[0][2], c[1][2]

	shearLog, bulkLog := t.shearByT/t.shear, t.bulkByT/t.bulk
	bySum := alongSum * (sum*(shearLog*(1+x.odds)/(6*t.shear)+bulkLog*2/(9*t.bulk)) - 2*t.freeByT)
	byDifference, byShear := shearLog*difference, shearLog*shear
	dz := 0.0
	if x.odds != 0 {
		byMises := (0.25*(sum/x.stress)*(bySum/x.stress) + 0.75*(difference/x.stress)*(byDifference/x.stress) +
			3*(shear/x.stress)*(byShear/x.stress))
		dz = ((n-h)*byMises + h*shearLog + x.rate.ByLogTemperature/temperature) / slope
	}
	back := -x.odds * x.stress * dz
	out.ByTemperature = tensor.Sym{
		tensor.XX: (bySum+byDifference)/2 + back*g[0],
		tensor.YY: (bySum-byDifference)/2 + back*g[1],
		tensor.XY: byShear + back*g[2],
	}
}

func sheetRefusal(old *State, inc *PlaneStressIncrement) Code {
	plane := tensor.Sym{inc.Strain[tensor.XX], inc.Strain[tensor.YY], tensor.XY: inc.Strain[tensor.XY]}
	all := Increment{Dt: inc.Dt, Strain: plane, Temperature: inc.Temperature}
	return refusal(old, &all)
}
