package main

import (
	"fmt"
	"io"
	"time"

	"github.com/vbauerster/mpb/v8"
	"github.com/vbauerster/mpb/v8/decor"
)

// progress tells how far a run has come. On a terminal it is a bar that goes
// away at the end; elsewhere one line every few seconds, so that a log stays
// short and a short run says nothing.
type progress struct {
	step func(stage string, done, total int)
	stop func()
}

// betweenLines is the pause between two lines of progress in a log.
const betweenLines = 5 * time.Second

// newProgress reports to w. Quiet calls get one that does nothing.
func newProgress(w io.Writer, terminal, quiet bool) progress {
	switch {
	case quiet:
		return progress{step: func(string, int, int) {}, stop: func() {}}
	case terminal:
		return newBar(w)
	}
	return newLines(w, time.Now)
}

// newLines writes a line when at least betweenLines have passed since the
// last one.
func newLines(w io.Writer, now func() time.Time) progress {
	last := now()
	return progress{
		step: func(stage string, done, total int) {
			if t := now(); t.Sub(last) >= betweenLines {
				last = t
				fmt.Fprintf(w, "%s: %d of %d\n", stage, done, total)
			}
		},
		stop: func() {},
	}
}

// newBar draws one bar at a time; a new stage takes the place of the last.
func newBar(w io.Writer) progress {
	box := mpb.New(mpb.WithOutput(w), mpb.WithWidth(40))
	var bar *mpb.Bar
	stage := ""
	end := func() {
		if bar != nil {
			bar.Abort(true)
			bar.Wait()
			bar = nil
		}
	}
	return progress{
		step: func(name string, done, total int) {
			if bar == nil || name != stage {
				end()
				stage = name
				bar = box.AddBar(int64(total), mpb.BarRemoveOnComplete(),
					mpb.PrependDecorators(decor.Name(name)), mpb.AppendDecorators(decor.Percentage()))
			}
			bar.SetCurrent(int64(done))
		},
		stop: func() { end(); box.Wait() },
	}
}
