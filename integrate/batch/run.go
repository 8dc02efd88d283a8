package batch

import (
	"context"
	"fmt"
	"runtime/debug"
	"sync"
	"sync/atomic"

	"example.com/holdtime/integrate"
	"example.com/holdtime/tensor"
)

// A chunk is the points a worker takes at a time: enough that the taking costs nothing, few enough that the workers end
// together and that a cancelled call ends soon.
const (
	largestChunk  = 256
	smallestChunk = 16 // a goroutine's start is then a fraction of its work
)

// run is one call of Step. Chunks are taken in the order of the points and always finished, so that the points done are those
// before the next chunk, whoever did them and whenever the call is cut short.
type run struct {
	*Batch
	points  *Points
	size    int // of a strain
	count   int
	chunk   int
	next    atomic.Int64 // first point of the next chunk
	tallies []tally      // one for each worker
	panicky atomic.Pointer[panicked]
}

func (b *Batch) run(ctx context.Context, p *Points, n int) error {
	workers := b.workersFor()
	r := run{Batch: b, points: p, size: b.layout.Len(), count: n}
	r.chunk = min(largestChunk, max(smallestChunk, n/(8*workers)))
	workers = min(workers, (n+r.chunk-1)/r.chunk)
	r.tallies = make([]tally, workers)
	var others sync.WaitGroup
	for k := 1; k < workers; k++ {
		others.Go(func() { r.work(ctx, &r.tallies[k]) })
	}
	defer others.Wait() // also where a law ends this goroutine: nobody may write to the caller's arrays afterwards
	r.work(ctx, &r.tallies[0])
	others.Wait()
	if p := r.panicky.Load(); p != nil {
		panic(p)
	}
	done := min(n, int(r.next.Load()))
	refused := merge(r.tallies, done, b.listed)
	switch {
	case done < n:
		return &InterruptedError{Done: done, Points: n, Cause: ctx.Err(), Refused: refused}
	case refused != nil:
		return refused
	}
	return nil
}

// panicked is a panic on its way from a worker to the caller of Step.
type panicked struct {
	value any
	stack []byte
}

func (p *panicked) Error() string {
	return fmt.Sprintf("batch: panic in a worker: %v\n\n%s", p.value, p.stack)
}

func (p *panicked) Unwrap() error {
	err, _ := p.value.(error)
	return err
}

// work takes chunks until there are none left.
func (r *run) work(ctx context.Context, t *tally) {
	ended := false
	defer func() {
		if v := recover(); v != nil {
			r.panicky.CompareAndSwap(nil, &panicked{v, debug.Stack()})
		} else if !ended { // a chunk that is left like this must not be taken for done
			r.panicky.CompareAndSwap(nil, &panicked{value: "the law ended the goroutine"})
		}
	}()
	var w desk
	for ctx.Err() == nil && r.panicky.Load() == nil {
		end := int(r.next.Add(int64(r.chunk)))
		start := end - r.chunk
		if start >= r.count {
			break
		}
		r.step(&w, start, min(end, r.count), t)
	}
	ended = true
}

func (r *run) step(w *desk, start, end int, t *tally) {
	if r.points.Tangent == nil && r.points.ByTemperature == nil {
		r.stressOnly(w, start, end, t)
	} else {
		r.withDerivatives(w, start, end, t)
	}
}

// desk is a worker's scratch.
type desk struct {
	inc    integrate.Increment
	old    integrate.State
	stress tensor.Sym
	out    integrate.Result
}

func (r *run) withDerivatives(w *desk, start, end int, t *tally) {
	p, size := r.points, r.size
	for i := start; i < end; i++ {
		m := r.input(p, i, &w.inc, &w.old)
		if err := r.materials[m].Step(&w.out, &w.old, w.inc); err != nil {
			t.add(i, err, r.listed)
			continue
		}
		r.output(i, m, &w.out.Stress, &w.out.State)
		if p.Tangent != nil {
			at := i * size * size
			r.layout.TangentOut(p.Tangent[at:at+size*size], &w.out.Tangent)
		}
		if p.ByTemperature != nil {
			r.layout.StressOut(p.ByTemperature[i*size:i*size+size], w.out.ByTemperature)
		}
	}
}

func (r *run) stressOnly(w *desk, start, end int, t *tally) {
	for i := start; i < end; i++ {
		m := r.input(r.points, i, &w.inc, &w.old)
		if err := r.materials[m].Stress(&w.stress, &w.old, &w.old, w.inc); err != nil {
			t.add(i, err, r.listed)
			continue
		}
		r.output(i, m, &w.stress, &w.old)
	}
}

// output writes stress and state of one point.
func (r *run) output(i, material int, stress *tensor.Sym, state *integrate.State) {
	size, at := r.size, i*r.stride
	r.layout.StressOut(r.points.Stress[i*size:i*size+size], *stress)
	r.materials[material].PackState(r.points.State[at:at+r.lengths[material]], state)
}
