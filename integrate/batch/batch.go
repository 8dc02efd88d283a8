package batch

import (
	"context"
	"fmt"
	"math"
	"runtime"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// Batch is what stays the same from call to call: materials, layout, options. It is checked by New, never changed afterwards,
// and may be used by any number of goroutines at the same time.
type Batch struct {
	materials []*integrate.Material
	lengths   []int // of a packed state of each material
	layout    tensor.Layout
	stride    int
	workers   int // 0 for as many as GOMAXPROCS says when a step begins
	listed    int
}

// Options are the choices a batch leaves open. The zero Options are the documented defaults.
type Options struct {
	// Workers is the largest number of goroutines that work on a call, the caller's own among them. 0 is runtime.GOMAXPROCS.
	Workers int

	// StateStride is the number of values from one point's state to the next in the host's arrays. 0 is the least, the longest
	// StateLength of the materials. What lies behind the state of a point is neither read nor written.
	StateStride int

	// Listed is the largest number of refused points that a RefusedError names one by one. 0 is 16.
	Listed int
}

const defaultListed = 16

// New builds a batch of one or more materials and the layout of the host's strains and stresses. The slice is copied. A missing
// material and an option no batch can have are a *SetupError.
func New(materials []*integrate.Material, layout tensor.Layout, options Options) (*Batch, error) {
	b := &Batch{
		materials: append([]*integrate.Material(nil), materials...),
		layout:    layout,
		stride:    options.StateStride,
		workers:   options.Workers,
		listed:    options.Listed,
	}
	if len(materials) == 0 {
		return nil, &SetupError{"number of materials", 0, "at least 1"}
	}
	longest := 0
	for i, m := range materials {
		if m == nil {
			return nil, &SetupError{"index of a nil material", i, "that of one that was made"}
		}
		b.lengths = append(b.lengths, m.StateLength())
		longest = max(longest, m.StateLength())
	}
	switch {
	case b.workers < 0:
		return nil, &SetupError{"number of workers", b.workers, "at least 0"}
	case b.listed < 0:
		return nil, &SetupError{"number of failures listed", b.listed, "at least 0"}
	case b.stride != 0 && b.stride < longest:
		return nil, &SetupError{"state stride", b.stride, fmt.Sprintf("0 or at least %d", longest)}
	}
	if b.stride == 0 {
		b.stride = longest
	}
	if b.listed == 0 {
		b.listed = defaultListed
	}
	return b, nil
}

// StateStride is the number of values from one point's state to the next in Old and State.
func (b *Batch) StateStride() int { return b.stride }

// Points is the input and output of one step of n points; n is the number of strains. L is the Len of the layout.
type Points struct {
	Dt          float64   // Δt: length of the step, the same for all points [time], >= 0
	Temperature []float64 // T: absolute temperature at the end of the step [K], > 0; one for each point, or a single one for all
	Strain      []float64 // ε: total strain at the end of the step [-], L for each point
	Material    []int     // index of each point's material in the slice New was given; nil is 0 for all
	Old         []float64 // state at the start, StateStride for each point; zeros are virgin material

	Stress []float64 // σ at the end of the step [stress], L for each point
	State  []float64 // state at the end, StateStride for each point; may be Old

	// Tangent is ∂σ/∂ε of the discrete update [stress], L×L for each point. Without it, and without ByTemperature, a step is
	// cheaper: Material.Stress serves where no derivative is wanted.
	Tangent []float64

	// ByTemperature is ∂σ/∂T of the discrete update at fixed strain [stress/K], L for each point. Optional like Tangent.
	ByTemperature []float64
}

// Step carries all points through an increment of time by Material.Step, and writes stress, state and the derivatives asked
// for.
//
// The error is nil when every point was stepped. A *RefusedError says which points were refused: their outputs are as they
// were, all others are complete. An *InterruptedError says that the context ended before the points did, and where. Bad data
// that concern the call as a whole are found before anything is written: a material that does not exist is an *IndexError; an
// impossible Dt, or single temperature, is an *integrate.UpdateError with the Code BadIncrement.
func (b *Batch) Step(ctx context.Context, p Points) error {
	n := b.checkLengths(&p)
	if err := b.checkData(&p); err != nil {
		return err
	}
	if n == 0 {
		return nil
	}
	return b.run(ctx, &p, n)
}

// Explain tells why a point was refused, as Material.Explain does. It takes the arrays of the call as Step left them; State
// being Old does no harm. An index that no point or material has panics.
func (b *Batch) Explain(p Points, f Failure) error {
	b.checkLengths(&p)
	var inc integrate.Increment
	var old integrate.State
	m := b.input(&p, f.Point, &inc, &old)
	return b.materials[m].Explain(f.Code, &old, inc)
}

// input reads one point.
func (b *Batch) input(p *Points, i int, inc *integrate.Increment, old *integrate.State) (material int) {
	if p.Material != nil {
		material = p.Material[i]
	}
	size := b.layout.Len()
	inc.Dt = p.Dt
	inc.Temperature = p.Temperature[0]
	if len(p.Temperature) > 1 {
		inc.Temperature = p.Temperature[i]
	}
	inc.Strain = b.layout.StrainIn(p.Strain[i*size : i*size+size])
	at := i * b.stride
	b.materials[material].UnpackState(old, p.Old[at:at+b.lengths[material]])
	return material
}

func (b *Batch) checkData(p *Points) error {
	if !(p.Dt >= 0) || math.IsInf(p.Dt, 1) {
		return &integrate.UpdateError{Code: integrate.BadIncrement, Quantity: "time step", Value: p.Dt}
	}
	if len(p.Temperature) == 1 {
		if t := p.Temperature[0]; !(t > 0) || math.IsInf(t, 1) {
			return &integrate.UpdateError{Code: integrate.BadIncrement, Quantity: "temperature", Value: t}
		}
	}
	for i, m := range p.Material {
		if uint(m) >= uint(len(b.materials)) {
			return &IndexError{Point: i, Index: m, Materials: len(b.materials)}
		}
	}
	return nil
}

// workersFor is the number of goroutines for a number of chunks.
func (b *Batch) workersFor() int {
	if b.workers > 0 {
		return b.workers
	}
	return runtime.GOMAXPROCS(0)
}
