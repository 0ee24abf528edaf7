package drainage_test

import (
	"fmt"

	"sagcrest/drainage"
	"sagcrest/profile"
	"sagcrest/section"
)

// A 900 mm pipe on the streambed: where are its ends, and is it covered?
func ExampleLay() {
	r := road(panics{}, fall, typical(), false, profile.PVI{At: 0, Elev: 100}, profile.PVI{At: 300, Elev: 103})
	l, found := drainage.Lay(r, new(section.Scratch), pipe(150, 20, true), 0)
	inlet, _ := l.Inlet()
	fmt.Println(len(found), l.Verdict)
	fmt.Printf("inlet at offset %.3f m, invert %.3f m\n", float64(inlet.Offset), inlet.Invert)
	fmt.Printf("length %.3f m, least cover %.3f m over the %s\n", l.Length, l.Least.Cover(), l.Least.What)
	// Output:
	// 0 ok
	// inlet at offset -12.590 m, invert 97.959 m
	// length 27.284 m, least cover 2.261 m over the hinge
}

// panics stands in for a test where there is none.
type panics struct{}

func (panics) Errorf(format string, args ...any) { panic(fmt.Sprintf(format, args...)) }
func (panics) FailNow()                          { panic("failed") }
