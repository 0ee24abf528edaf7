package profile_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"sagcrest/profile"
	"sagcrest/profile/station"
)

// Curves may touch but not overlap, nor run beyond the first or last PVI; the
// message names the length that fits.
func TestCurvesNeedRoom(t *testing.T) {
	touch := []profile.PVI{{At: 0, Elev: 0}, {At: 100, Elev: 2, Length: 120}, {At: 200, Elev: 1, Length: 80}, {At: 300, Elev: 3}}
	_, found := profile.New(touch)
	assert.Empty(t, found)

	touch[2].Length = 80.001
	p, found := profile.New(touch)
	assert.Nil(t, p)
	require.Len(t, found, 1)
	assert.Equal(t, "P01", string(found[0].Code))
	assert.Equal(t, "profile.pvi[2].length", found[0].At.Key)
	assert.InDelta(t, 80, found[0].Limit.Value, 1e-6)

	_, found = profile.New([]profile.PVI{{At: 0, Elev: 0}, {At: 50, Elev: 2, Length: 101}, {At: 300, Elev: 3}})
	require.Len(t, found, 1)
	assert.InDelta(t, 100, found[0].Limit.Value, 1e-9)
	_, found = profile.New([]profile.PVI{{At: 0, Elev: 0}, {At: 250, Elev: 2, Length: 101}, {At: 300, Elev: 3}})
	require.Len(t, found, 1)
}

func TestStationsIncrease(t *testing.T) {
	p, found := profile.New([]profile.PVI{{At: 0}, {At: 50}, {At: 50}, {At: 40}})
	assert.Nil(t, p)
	require.Len(t, found, 2)
	assert.Equal(t, "A01", string(found[0].Code))
	_, found = profile.New([]profile.PVI{{At: 0}})
	require.Len(t, found, 1)
}

// A printed table is held to 5 mm; K by the length that it makes.
func TestCurveTable(t *testing.T) {
	p := build(t, profile.PVI{At: 0, Elev: 110}, profile.PVI{At: 500, Elev: 100, Length: 200}, profile.PVI{At: 1000, Elev: 107.5})
	k, l := 57.142, 200.0
	pvc, pvt := station.Station(400), station.Station(600.004)
	assert.Empty(t, p.CheckTable([]profile.CurveClaim{{PVI: 500, Length: &l, K: &k, PVC: &pvc, PVT: &pvt}}))

	k, pvt = 57.1, 600.006
	found := p.CheckTable([]profile.CurveClaim{{PVI: 500, K: &k, PVT: &pvt}, {PVI: 600, Length: &l}})
	require.Len(t, found, 3)
	assert.Equal(t, "profile.curve_table[0].k", found[0].At.Key)
	assert.Equal(t, "profile.curve_table[0].pvt", found[1].At.Key)
	assert.Equal(t, "profile.curve_table[1].pvi", found[2].At.Key)
}

func TestTieIns(t *testing.T) {
	p := build(t, profile.PVI{At: 0, Elev: 110}, profile.PVI{At: 500, Elev: 100})
	near, far := -0.0204, -0.0206
	assert.Empty(t, p.CheckTieIns([]profile.TieIn{{Name: "a", Elev: 110.004, Grade: &near}, {Name: "b", AtEnd: true, Elev: 100}}))
	found := p.CheckTieIns([]profile.TieIn{{Name: "a", Elev: 110.006, Grade: &far}})
	require.Len(t, found, 2)
	assert.Equal(t, "P12", string(found[0].Code))
	assert.Equal(t, "tie_in[0].grade", found[1].At.Key)
}
