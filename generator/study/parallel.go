package study

import (
	"runtime"
	"sync"
	"sync/atomic"

	"ohmfolio/generator/material"
)

// each answers about every record, several at a time, in the order of the
// records. The parameters have been read by then and are only looked at.
func (w *work) each(records []*material.Record, about func(r *material.Record) []*answer) []*answer {
	w.houseResistivity()
	lists := make([][]*answer, len(records))
	inParallel(len(records), func(i int) { lists[i] = about(records[i]) })
	var answers []*answer
	for _, list := range lists {
		answers = append(answers, list...)
	}
	return answers
}

// inParallel does n things, several at a time when they are many.
func inParallel(n int, do func(i int)) {
	var next atomic.Int64
	take := func() {
		for i := int(next.Add(1)) - 1; i < n; i = int(next.Add(1)) - 1 {
			do(i)
		}
	}
	var wait sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0), n/8) - 1 {
		wait.Go(take)
	}
	take()
	wait.Wait()
}
