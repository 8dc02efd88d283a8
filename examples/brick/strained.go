package main

import (
	"math"

	"example.com/holdtime/bench"
	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// field are the displacements u = ε x of a uniform strain.
func (b *body) field(strain tensor.Sym) []float64 {
	m := [3]vector{{strain[tensor.XX], strain[tensor.XY], strain[tensor.XZ]},
		{strain[tensor.XY], strain[tensor.YY], strain[tensor.YZ]}, {strain[tensor.XZ], strain[tensor.YZ], strain[tensor.ZZ]}}
	moved := make([]float64, b.unknowns())
	for a, x := range b.nodes {
		for d := range 3 {
			moved[3*a+d] = dot(m[d], x)
		}
	}
	return moved
}

// none are no nodal forces.
func (b *body) none() []float64 { return make([]float64, b.unknowns()) }

const (
	barStress = 200 // MPa, at the start of the relaxation
	barHours  = 100
)

// relax stretches a brick between two rigid plates that leave its sides free and lets it relax in so many steps. It returns
// the stress along x and how far any component of any point is from being in uniaxial stress, over the first stress.
func relax(b *body, steps int) (stress, spread float64, err error) {
	stretched := b.field(tensor.Sym{tensor.XX: barStress / young})
	w := walk{body: b,
		impose: func(_, temperature float64) demand {
			return demand{temperature: temperature, force: b.none(), held: b.plates()}
		},
		start: func(now *condition, _ float64) []float64 {
			if now.time == 0 && now.stress[0][0] == 0 {
				return stretched
			}
			return now.displacement
		},
	}
	w.seen = func(_ stage, _ bool, now *condition, _ float64, _ []float64) {
		stress = b.meanStress(now)[tensor.XX]
		spread = math.Max(spread, b.spread(now, tensor.Sym{tensor.XX: stress})/barStress)
	}
	err = w.through([]stage{{"stretch", 0, 1, 1, 0}, {"hold", barHours, steps, 1, 0}})
	return stress, spread, err
}

// generalStress is where the strained patch starts: all components, none equal.
var generalStress = tensor.Sym{tensor.XX: 150, tensor.YY: -20, tensor.ZZ: 40, tensor.YZ: 35, tensor.XZ: 10, tensor.XY: 60}

func solidRelaxation(exponent float64) bench.SolidRelaxation {
	return bench.SolidRelaxation{Young: young, Poisson: poisson, Stress: generalStress, Law: closedNorton(exponent, 0)}
}

// strainProgram moves the boundary of the patch; loads are shares of the strain of generalStress.
func strainProgram(steps int) []stage {
	return []stage{
		{"load", 0, 1, 1, 0},
		{"hold", 100, steps, 1, 0},
		{"reverse", 1, 4, -0.5, 0},
		{"heat", 100, 4, -0.5, hotter},
		{"hold", 1000, 4, -0.5, hotter},
		{"unload", 1, 4, 0, hotter},
	}
}

// strainedRow is the patch at the end of a stage.
type strainedRow struct {
	stage
	time       float64
	mises      float64    // of the single material point [MPa]
	stress     tensor.Sym // of the single material point [MPa]
	mean       tensor.Sym // mean over the integration points
	spread     float64    // largest difference of any component of any integration point from it, over the first Mises stress
	inner      float64    // largest distance of an inner node from the linear field, over the largest displacement of all
	iterations int        // most in a step
}

// strained moves the outer nodes of a patch with a uniform strain, leaves the inner ones free and holds every integration
// point against one material point that is given the same strain. Each iteration starts with the inner nodes where they were
// in the unloaded mesh, so that it has something to find.
func strained(b *body, exponent float64, program []stage) (rows []strainedRow, worst []float64, err error) {
	unit := solidRelaxation(exponent).Strain()
	held := b.boundary()
	var single integrate.Result
	row := strainedRow{}
	w := walk{body: b,
		impose: func(_, temperature float64) demand {
			return demand{temperature: temperature, force: b.none(), held: held}
		},
		start: func(_ *condition, load float64) []float64 {
			moved := b.field(unit.Scale(load))
			for i, h := range held {
				if !h {
					moved[i] = 0
				}
			}
			return moved
		},
	}
	var failed error
	w.seen = func(s stage, last bool, now *condition, load float64, residuals []float64) {
		inc := integrate.Increment{Dt: s.hours / float64(s.steps), Strain: unit.Scale(load), Temperature: now.temperature}
		if err := b.material.Step(&single, &single.State, inc); err != nil {
			failed = err
		}
		if len(residuals) > len(worst) {
			worst = residuals
		}
		row.iterations = max(row.iterations, len(residuals)-1)
		row.spread = math.Max(row.spread, b.spread(now, single.Stress)/generalStress.Mises())
		row.inner = math.Max(row.inner, deviation(now.displacement, b.field(unit.Scale(load))))
		if last {
			row.stage, row.time, row.stress, row.mises = s, now.time, single.Stress, single.Stress.Mises()
			row.mean = b.meanStress(now)
			rows = append(rows, row)
			row = strainedRow{}
		}
	}
	if err := w.through(program); err != nil {
		return nil, worst, err
	}
	return rows, worst, failed
}

// meanStress is the mean over the integration points.
func (b *body) meanStress(c *condition) tensor.Sym {
	var mean tensor.Sym
	for i := range c.stress {
		mean = mean.Add(b.layout.StressIn(c.stress[i][:]).Scale(1 / float64(len(c.stress))))
	}
	return mean
}

// deviation is the largest difference of two fields over the largest component of the second, 0 for two zero fields.
func deviation(a, b []float64) float64 {
	difference, largest := 0.0, 0.0
	for i := range a {
		difference = math.Max(difference, math.Abs(a[i]-b[i]))
		largest = math.Max(largest, math.Abs(b[i]))
	}
	if difference == 0 {
		return 0
	}
	return difference / largest
}
