package integrate

import (
	"fmt"
	"math"
	"strings"

	"example.com/holdtime/tensor"
)

// Given says which side of a component of stress and strain is prescribed.
type Given uint8

const (
	// GivenStrain: the total strain ε of the component is prescribed (tensor shear).
	GivenStrain Given = iota
	// GivenStress: its stress σ is prescribed.
	GivenStress
	// GivenRelation: a linear relation a σ + b ε = c is prescribed by its right side c.
	GivenRelation
)

// String returns "strain", "stress" or "relation".
func (g Given) String() string {
	if int(g) < len(givenNames) {
		return givenNames[g]
	}
	return fmt.Sprintf("Given(%d)", uint8(g))
}

var givenNames = [...]string{GivenStrain: "strain", GivenStress: "stress", GivenRelation: "relation"}

// Condition is what is prescribed of one component. The zero Condition is a prescribed strain.
//
// A relation a σ + b ε = c stands for elastic surroundings in series with the material: with b = 1, a is their compliance
// [1/stress] and c the strain that both together are given. a and b need not be scaled, but must not have opposite signs:
// surroundings that push when they are let go have no stable answer.
type Condition struct {
	By     Given
	Stress float64 // a, the factor of the stress in a relation; otherwise zero
	Strain float64 // b, the factor of the strain in a relation (tensor shear); otherwise zero
}

// Control says what a step of StepMixed prescribes: one Condition for each of the six components. The zero Control
// prescribes all strains. A Control is a plain value: copy it, compare it, share it.
type Control struct {
	component [6]condition
}

// condition is a checked Condition: ε + compliance σ = c/divisor, or σ = c/divisor.
type condition struct {
	stress     bool
	compliance float64 // a/b
	divisor    float64 // of the prescribed value; 0 stands for 1
}

// ControlError says that a condition was asked for that cannot be prescribed.
type ControlError struct {
	Component string  // such as "xx"
	Quantity  string  // such as "factor of the strain"
	Value     float64 // the value that was given
	Want      string  // what it must be
}

func (e *ControlError) Error() string {
	return fmt.Sprintf("integrate: control of %s: %s is %v, must be %s", e.Component, e.Quantity, e.Value, e.Want)
}

// NewControl builds a control from the conditions of xx, yy, zz, yz, xz and xy. A relation with factors that are both zero,
// not finite or of opposite sign, factors where no relation is prescribed, and an unknown Given are a *ControlError.
func NewControl(conditions [6]Condition) (Control, error) {
	var c Control
	for i, given := range conditions {
		if err := given.check(componentNames[i]); err != nil {
			return Control{}, err
		}
		switch {
		case given.By == GivenStress:
			c.component[i] = condition{stress: true}
		case given.By == GivenRelation && given.Strain == 0:
			c.component[i] = condition{stress: true, divisor: given.Stress}
		case given.By == GivenRelation:
			c.component[i] = condition{compliance: given.Stress / given.Strain, divisor: given.Strain}
		}
	}
	return c, nil
}

func (g Condition) check(component string) error {
	fault := func(quantity string, value float64, want string) error {
		return &ControlError{component, quantity, value, want}
	}
	switch {
	case g.By > GivenRelation:
		return fault("what is given", float64(g.By), "a strain, a stress or a relation")
	case g.By != GivenRelation && g.Stress != 0:
		return fault("factor of the stress", g.Stress, "zero where no relation is given")
	case g.By != GivenRelation && g.Strain != 0:
		return fault("factor of the strain", g.Strain, "zero where no relation is given")
	case !finite(g.Stress):
		return fault("factor of the stress", g.Stress, "finite")
	case !finite(g.Strain):
		return fault("factor of the strain", g.Strain, "finite")
	case g.By == GivenRelation && g.Stress == 0 && g.Strain == 0:
		return fault("factor of the strain", 0, "other than zero when that of the stress is zero")
	case g.Strain != 0 && (g.Stress/g.Strain < 0 || math.IsInf(g.Stress/g.Strain, 0)):
		return fault("factor of the stress over that of the strain", g.Stress/g.Strain, "at least zero and finite")
	}
	return nil
}

// String lists the components by what is prescribed of them, such as "strain xx, stress yy zz yz xz xy".
func (c Control) String() string {
	var lists [3][]string
	for i := range c.component {
		by := c.given(i)
		lists[by] = append(lists[by], componentNames[i])
	}
	var parts []string
	for by, components := range lists {
		if len(components) > 0 {
			parts = append(parts, Given(by).String()+" "+strings.Join(components, " "))
		}
	}
	return strings.Join(parts, ", ")
}

func (c *Control) given(i int) Given {
	switch k := &c.component[i]; {
	case k.stress:
		return GivenStress
	case k.compliance != 0:
		return GivenRelation
	}
	return GivenStrain
}

// unit returns what one unit of the prescribed value is in stress or strain.
func (k *condition) unit() float64 {
	if k.divisor == 0 {
		return 1
	}
	return 1 / k.divisor
}

// stressIn prescribes the stress of the components named and the strain of the rest.
func stressIn(components ...int) Control {
	var c Control
	for _, i := range components {
		c.component[i].stress = true
	}
	return c
}

// StressControl prescribes all six stresses: a load test under any state of stress, and biaxial or triaxial load.
func StressControl() Control {
	return stressIn(tensor.XX, tensor.YY, tensor.ZZ, tensor.YZ, tensor.XZ, tensor.XY)
}

// UniaxialStress prescribes the axial strain ε_xx and the five other stresses, usually zero: a bar whose length is given, or
// that is held between rigid ends while it heats. StepUniaxial is its light entry point.
func UniaxialStress() Control {
	return stressIn(tensor.YY, tensor.ZZ, tensor.YZ, tensor.XZ, tensor.XY)
}

// PlaneStress prescribes the strains ε_xx, ε_yy, ε_xy in the plane of a sheet and the three other stresses, usually zero.
// StepPlaneStress is its light entry point.
func PlaneStress() Control { return stressIn(tensor.ZZ, tensor.YZ, tensor.XZ) }

// BiaxialStress prescribes the strains ε_xx and ε_yy in the two directions of a cross-shaped specimen and the four other
// stresses, usually zero.
func BiaxialStress() Control { return stressIn(tensor.ZZ, tensor.YZ, tensor.XZ, tensor.XY) }

// Torsion prescribes the shear strain ε_xy (half the engineering shear) of a thin-walled tube that is twisted and the five
// other stresses: σ_xx is the axial stress of tension and torsion together, zero when the tube is free to change its length.
func Torsion() Control {
	return stressIn(tensor.XX, tensor.YY, tensor.ZZ, tensor.YZ, tensor.XZ)
}

// ConfinedCompression prescribes the axial stress σ_xx and the five other strains, usually zero: a specimen in a rigid
// cylinder.
func ConfinedCompression() Control { return stressIn(tensor.XX) }

// FullyConstrained prescribes all six strains, as Step does: a point inside rigid walls while it heats. It is the zero
// Control.
func FullyConstrained() Control { return Control{} }

// FollowUp is UniaxialStress with elastic surroundings that follow up. Prescribed for xx is
//
//	ε_xx + (Z-1) σ_xx/E
//
// the strain that bar and surroundings are given together; while it is held, the bar relaxes as if its modulus were E/Z. Z = 1
// is a fixed length. E [stress] is Young's modulus at one temperature, so the compliance (Z-1)/E is that of elastic
// surroundings which do not change. E must be positive and finite and Z at least 1 and finite, else a *ControlError.
//
// Source: definition of Z as in the R5 procedure, vol. 2/3 (from memory); J. T. Boyle, J. Spence 1983.
func FollowUp(young, factor float64) (Control, error) {
	if !(young > 0) || !finite(young) {
		return Control{}, &ControlError{"xx", "Young's modulus", young, "positive and finite"}
	}
	if !(factor >= 1) || !finite((factor-1)/young) {
		return Control{}, &ControlError{"xx", "follow-up factor", factor, "at least 1 and finite"}
	}
	c := UniaxialStress()
	c.component[tensor.XX].compliance = (factor - 1) / young
	return c, nil
}
