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
	workers := min(runtime.GOMAXPROCS(0), len(records)/8)
	var next atomic.Int64
	take := func() {
		for i := int(next.Add(1)) - 1; i < len(records); i = int(next.Add(1)) - 1 {
			lists[i] = about(records[i])
		}
	}
	var wait sync.WaitGroup
	for range workers - 1 {
		wait.Go(take)
	}
	take()
	wait.Wait()
	var answers []*answer
	for _, list := range lists {
		answers = append(answers, list...)
	}
	return answers
}
