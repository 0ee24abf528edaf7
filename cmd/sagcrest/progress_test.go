package main

import (
	"bytes"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"go.uber.org/goleak"
)

func TestProgressInALogIsOneLineEveryFiveSeconds(t *testing.T) {
	var log bytes.Buffer
	now := time.Unix(0, 0)
	p := newLines(&log, func() time.Time { return now })
	for i := range 12 {
		now = now.Add(time.Second)
		p.step("sections", i+1, 12)
	}
	p.stop()
	assert.Equal(t, "sections: 5 of 12\nsections: 10 of 12\n", log.String())
}

func TestQuietProgressSaysNothing(t *testing.T) {
	var log bytes.Buffer
	for _, terminal := range []bool{true, false} {
		p := newProgress(&log, terminal, true)
		p.step("sections", 1, 1)
		p.stop()
	}
	assert.Empty(t, log.String())
}

// A bar has a goroutine of its own, which must end whether a stage was finished
// or broken off.
func TestBarEnds(t *testing.T) {
	defer goleak.VerifyNone(t)
	for _, last := range []int{3, 10} {
		var screen bytes.Buffer
		p := newBar(&screen)
		p.step("sections", 1, 10)
		p.step("volumes", 1, 10)
		p.step("volumes", last, 10)
		p.stop()
	}
	p := newBar(&bytes.Buffer{})
	p.stop()
}
