package batch_test

import (
	"context"
	"errors"
	"math"
	"runtime"
	"sync"
	"sync/atomic"
	"testing"

	"github.com/stretchr/testify/require"

	"example.com/holdtime/creeplaw"
	"example.com/holdtime/integrate"
	"example.com/holdtime/integrate/batch"
	"example.com/holdtime/tensor"
)

// TestWorkersRefused: the report of a call is complete and in order, and speaks the language of errors and of integrate.Recoverable.
func TestWorkersRefused(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	const n = 3000
	p := h.outputs(h.draw(n), true)
	want := h.loop(p)
	byCode := map[integrate.Code]int{}
	for _, f := range want {
		byCode[f.Code]++
	}
	require.Len(t, byCode, 4, "the draw has four ways to fail")
	for _, workers := range []int{1, 2, 7} {
		for _, listed := range []int{0, 1, 5, len(want) + 1} {
			err := h.batch(t, batch.Options{Workers: workers, Listed: listed}).Step(context.Background(), p)
			var refused *batch.RefusedError
			require.ErrorAs(t, err, &refused)
			if listed == 0 {
				listed = 16
			}
			require.Equal(t, want[:min(listed, len(want))], refused.First)
			require.Equal(t, len(want), refused.Total)
			for code := integrate.Code(1); code < 20; code++ {
				require.Equal(t, byCode[code], refused.Of(code), code)
				require.Equal(t, byCode[code] > 0, errors.Is(err, code), code)
			}
			require.False(t, integrate.Recoverable(err), "a NaN does not go away with a smaller step")
		}
	}
}

// TestRecoverable: a call can be repeated with a smaller step when each refused point can.
func TestRecoverable(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	p := h.sound(h.draw(40))
	ruptures := func(i int) {
		p.Material[i], p.Old[i*h.stride+7] = 3, 0.999
		p.Strain[i*6] = 3e-3
	}
	ruptures(30)
	ruptures(20)
	b := h.batch(t, batch.Options{Listed: 1})
	err := b.Step(context.Background(), p)
	require.True(t, integrate.Recoverable(err), "%v", err)
	require.EqualError(t, err, "batch: 2 of 40 points refused, first point 20: integrate: the step reaches beyond rupture")

	p.Strain[35*6] = math.Inf(1) // behind those that are listed
	require.False(t, integrate.Recoverable(b.Step(context.Background(), p)))
}

// TestExplain names the quantity at fault, also when states are updated in place.
func TestExplain(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	p := h.outputs(h.draw(2000), false)
	p.State = p.Old
	b := h.batch(t, batch.Options{Listed: 2000})
	var refused *batch.RefusedError
	require.ErrorAs(t, b.Step(context.Background(), p), &refused)
	quantities := map[string]bool{}
	for _, f := range refused.First {
		err := b.Explain(p, f)
		require.ErrorIs(t, err, f.Code)
		var why *integrate.UpdateError
		require.ErrorAs(t, err, &why)
		quantities[why.Quantity] = true
		if f.Code == integrate.BadState {
			require.EqualValues(t, -1, why.Value)
		}
	}
	require.Contains(t, quantities, "strain xx")
	require.Contains(t, quantities, "equivalent creep strain")
}

// watched is Norton's law that tells somebody each time it is asked, and may be made to misbehave.
type watched struct {
	creeplaw.Norton
	asked *atomic.Int64
	after func(asked int64)
}

func (w watched) LogRate(p creeplaw.Point) creeplaw.LogRate {
	w.after(w.asked.Add(1))
	return w.Norton.LogRate(p)
}

func (h *plant) watch(t *testing.T, after func(int64)) {
	t.Helper()
	norton, err := creeplaw.NewNortonAt(1e-6, 100, 5)
	require.NoError(t, err)
	m, err := integrate.New(integrate.NewIsotropic(160e3, 0.3), watched{norton, new(atomic.Int64), after}, integrate.Options{})
	require.NoError(t, err)
	h.materials = []*integrate.Material{m}
}

// TestWorkersInterrupted: a call that is cancelled half way says where it stopped; the points before are complete, the others
// untouched, and a second call finishes them.
func TestWorkersInterrupted(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	const n = 20000
	p := h.draw(n)
	p.Material = nil
	h.watch(t, func(int64) {})
	want := h.outputs(p, true)
	all := h.loop(want)
	for _, workers := range []int{1, 2, 3, 8} {
		ctx, cancel := context.WithCancel(context.Background())
		h.watch(t, func(asked int64) {
			if asked == n { // a step asks several times
				cancel()
			}
		})
		got := h.outputs(p, true)
		b := h.batch(t, batch.Options{Workers: workers, Listed: n})
		err := b.Step(ctx, got)
		var interrupted *batch.InterruptedError
		require.ErrorAs(t, err, &interrupted)
		require.ErrorIs(t, err, context.Canceled)
		done := interrupted.Done
		require.Greater(t, done, n/10)
		require.Less(t, done, n*9/10)
		require.Equal(t, n, interrupted.Points)
		var refused *batch.RefusedError
		require.ErrorAs(t, err, &refused)
		require.Equal(t, done, refused.Points)
		require.Equal(t, before(all, done), refused.First)

		requireBits(t, h.slice(want, 0, done), h.slice(got, 0, done), "before the interruption")
		requireBits(t, h.outputs(h.slice(p, done, n), true), h.slice(got, done, n), "behind the interruption")
		require.ErrorAs(t, b.Step(context.Background(), h.slice(got, done, n)), &refused)
		require.Equal(t, len(all)-len(before(all, done)), refused.Total)
		requireBits(t, want, got, "finished by a second call")
		cancel()
	}
}

// before are the failures of the points before one.
func before(list []batch.Failure, point int) (out []batch.Failure) {
	for _, f := range list {
		if f.Point < point {
			out = append(out, f)
		}
	}
	return out
}

// TestNeverBegun: a context that has ended beforehand lets nothing happen.
func TestNeverBegun(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	p := h.outputs(h.draw(100), true)
	ctx, cancel := context.WithTimeout(context.Background(), -1)
	defer cancel()
	err := h.batch(t, batch.Options{}).Step(ctx, p)
	require.Equal(t, &batch.InterruptedError{Points: 100, Cause: context.DeadlineExceeded}, err)
	requireBits(t, h.outputs(p, true), p, "never begun")
}

// TestWorkersPanic: a law's panic, in whichever goroutine, comes out of Step.
func TestWorkersPanic(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	p := h.outputs(h.draw(2000), true)
	p.Material = nil
	fault := errors.New("the law has a bug")
	for _, workers := range []int{1, 4} {
		h.watch(t, func(asked int64) {
			if asked%1000 == 0 {
				panic(fault)
			}
		})
		b := h.batch(t, batch.Options{Workers: workers})
		func() {
			defer func() {
				err, ok := recover().(error)
				require.True(t, ok)
				require.ErrorIs(t, err, fault)
				require.ErrorContains(t, err, "LogRate", "the stack of the law is told")
			}()
			_ = b.Step(context.Background(), p)
			t.Error("no panic")
		}()
	}
}

// TestWorkersEnded: a law that ends its goroutine does not make Step take the points left behind for done. Step does not
// return, by whichever goroutine was ended.
func TestWorkersEnded(t *testing.T) {
	h := newPlant(t, "xx yy zz xy yz xz", tensor.EngineeringShear)
	p := h.outputs(h.draw(2000), true)
	p.Material = nil
	for range 5 {
		h.watch(t, func(asked int64) {
			if asked == 1000 {
				runtime.Goexit()
			}
		})
		b := h.batch(t, batch.Options{Workers: 4})
		returned := false
		var wait sync.WaitGroup
		wait.Go(func() {
			defer func() { _ = recover() }()
			_ = b.Step(context.Background(), p)
			returned = true
		})
		wait.Wait()
		require.False(t, returned)
	}
}

// TestWorkersShareBatch: one batch serves several calls at the same time.
func TestWorkersShareBatch(t *testing.T) {
	h := newPlant(t, "xx yy zz xy", tensor.EngineeringShear)
	b := h.batch(t, batch.Options{Workers: 3})
	want := h.outputs(h.draw(1000), true)
	h.loop(want)
	got := make([]batch.Points, 5)
	var wait sync.WaitGroup
	for i := range got {
		got[i] = h.outputs(want, true)
		wait.Go(func() { _ = b.Step(context.Background(), got[i]) })
	}
	wait.Wait()
	for i := range got {
		requireBits(t, want, got[i], "calls at the same time")
	}
}

// TestWrongLengths: the panic names array, length and wanted length, and nothing has been written.
func TestWrongLengths(t *testing.T) {
	h := newPlant(t, "xx yy zz xy", tensor.EngineeringShear)
	b := h.batch(t, batch.Options{})
	good := h.outputs(h.draw(10), true)
	for want, spoil := range map[string]func(*batch.Points){
		"batch: Strain has length 39, want a multiple of 4": func(p *batch.Points) { p.Strain = p.Strain[:39] },
		"batch: Temperature has length 9, want 1 or 10":     func(p *batch.Points) { p.Temperature = p.Temperature[:9] },
		"batch: Temperature has length 0, want 1 or 10":     func(p *batch.Points) { p.Temperature = nil },
		"batch: Old has length 79, want 80":                 func(p *batch.Points) { p.Old = p.Old[:79] },
		"batch: Stress has length 0, want 40":               func(p *batch.Points) { p.Stress = nil },
		"batch: State has length 70, want 80":               func(p *batch.Points) { p.State = p.State[:70] },
		"batch: Material has length 11, want 10":            func(p *batch.Points) { p.Material = make([]int, 11) },
		"batch: Tangent has length 40, want 160":            func(p *batch.Points) { p.Tangent = p.Tangent[:40] },
		"batch: ByTemperature has length 0, want 40":        func(p *batch.Points) { p.ByTemperature = []float64{} },
	} {
		p := good
		spoil(&p)
		require.PanicsWithValue(t, want, func() { _ = b.Step(context.Background(), p) })
	}
	requireBits(t, h.outputs(good, true), good, "written before the panic")
}

// TestBadCalls: data that concern the call as a whole are typed errors, and nothing has been written.
func TestBadCalls(t *testing.T) {
	h := newPlant(t, "xx yy zz xy", tensor.EngineeringShear)
	b := h.batch(t, batch.Options{})
	good := h.outputs(h.draw(10), true)
	for _, dt := range []float64{-1, math.NaN(), math.Inf(1), math.Inf(-1)} {
		p := good
		p.Dt = dt
		requireBadIncrement(t, b.Step(context.Background(), p), "time step")
	}
	for _, temperature := range []float64{0, -20, math.NaN(), math.Inf(1)} {
		p := good
		p.Temperature = []float64{temperature}
		requireBadIncrement(t, b.Step(context.Background(), p), "temperature")
	}
	for _, index := range []int{-1, 5, math.MinInt, math.MaxInt} {
		p := good
		p.Material = make([]int, 10)
		p.Material[7], p.Material[9] = index, index
		require.Equal(t, &batch.IndexError{Point: 7, Index: index, Materials: 5}, b.Step(context.Background(), p))
	}
	requireBits(t, h.outputs(good, true), good, "written although the call is impossible")
}

func requireBadIncrement(t *testing.T, err error, quantity string) {
	t.Helper()
	var bad *integrate.UpdateError
	require.ErrorAs(t, err, &bad)
	require.Equal(t, quantity, bad.Quantity)
	require.ErrorIs(t, err, integrate.BadIncrement)
}

// TestBadSetups: what New cannot build it names.
func TestBadSetups(t *testing.T) {
	h := newPlant(t, "xx yy zz xy", tensor.EngineeringShear)
	for want, build := range map[string]func() (*batch.Batch, error){
		"batch: number of materials is 0, must be at least 1":        func() (*batch.Batch, error) { return batch.New(nil, h.layout, batch.Options{}) },
		"batch: number of workers is -1, must be at least 0":         func() (*batch.Batch, error) { return batch.New(h.materials, h.layout, batch.Options{Workers: -1}) },
		"batch: number of failures listed is -2, must be at least 0": func() (*batch.Batch, error) { return batch.New(h.materials, h.layout, batch.Options{Listed: -2}) },
		"batch: state stride is 7, must be 0 or at least 8":          func() (*batch.Batch, error) { return batch.New(h.materials, h.layout, batch.Options{StateStride: 7}) },
		"batch: index of a nil material is 1, must be that of one that was made": func() (*batch.Batch, error) {
			return batch.New([]*integrate.Material{h.materials[0], nil}, h.layout, batch.Options{})
		},
	} {
		b, err := build()
		require.Nil(t, b)
		require.EqualError(t, err, want)
		var setup *batch.SetupError
		require.ErrorAs(t, err, &setup)
	}
}
