package integrate

import "example.com/holdtime/tensor"

// throughStep reports whether only Step knows how to carry the material: with internal variables, a law that sees more of the
// stress than its von Mises equivalent, or plasticity. The light entry points then go through StepMixed.
func (m *Material) throughStep() bool { return m.memory.law != nil || m.plastic != nil }

// bridgeUniaxial is StepUniaxial or StepUniaxialStress by StepMixed.
func (m *Material) bridgeUniaxial(out *UniaxialResult, old *State, inc MixedIncrement) Code {
	var r MixedResult
	if code := m.stepMixed(&r, old, &inc, true); code != 0 {
		return code
	}
	*out = UniaxialResult{
		Stress:        r.Stress[tensor.XX],
		Strain:        r.Strain,
		State:         r.State,
		Tangent:       r.StressBy[tensor.XX][tensor.XX],
		ByTemperature: r.StressByTemperature[tensor.XX],
		CreepStep:     r.CreepStep,
		PlasticStep:   r.PlasticStep,
		Iterations:    r.Iterations,
		Residual:      r.Residual,
	}
	if inc.Control.component[tensor.XX].stress {
		out.Tangent = 1 / r.StrainBy[tensor.XX][tensor.XX]
		out.ByTemperature = -r.StrainByTemperature[tensor.XX] * out.Tangent
	}
	return 0
}

// bridgePlaneStress is StepPlaneStress by StepMixed.
func (m *Material) bridgePlaneStress(out *PlaneStressResult, old *State, inc *PlaneStressIncrement) Code {
	var r MixedResult
	mixed := inc.asMixed()
	if code := m.stepMixed(&r, old, &mixed, true); code != 0 {
		return code
	}
	*out = PlaneStressResult{
		Stress:        r.Stress,
		Strain:        r.Strain,
		State:         r.State,
		ByTemperature: r.StressByTemperature,
		CreepStep:     r.CreepStep,
		PlasticStep:   r.PlasticStep,
		Iterations:    r.Iterations,
		Residual:      r.Residual,
	}
	plane := [3]int{tensor.XX, tensor.YY, tensor.XY}
	for i, row := range plane {
		for j, column := range plane {
			out.Tangent[i][j] = r.StressBy[row][column]
		}
		out.Tangent[i][2] /= 2 // from the derivative by tensor shear to the tensor component
	}
	return 0
}
