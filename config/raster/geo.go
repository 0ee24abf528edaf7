package raster

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// Keys of GeoTIFF 1.1, all of them short numbers.
const (
	keyModelType     = 1024
	keyRasterType    = 1025
	keyProjectedCRS  = 3072
	keyLinearUnits   = 3076
	keyVerticalCRS   = 4096
	keyVerticalUnits = 4099
)

// Values of keys.
const (
	modelProjected = 1
	pixelIsArea    = 1
	pixelIsPoint   = 2
	userDefined    = 32767
	// firstUnassigned and above are private codes.
	firstUnassigned = 32768
)

// geoKeys reads the short keys of a GeoTIFF; mostKeys bounds their number.
func (d *directory) geoKeys() (map[uint16]uint16, error) {
	const mostKeys = 1024
	v, err := d.uints(tagGeoKeys, 4*(mostKeys+1))
	if err != nil || len(v) < 4 {
		return nil, err
	}
	if n := v[3]; n*4+4 > uint64(len(v)) {
		return nil, broken("the directory of keys at byte %d claims %d keys in %d numbers", d.fields[tagGeoKeys].at, n, len(v))
	}
	keys := map[uint16]uint16{}
	for i := uint64(1); i <= v[3]; i++ {
		// A key at location 0 is its own value.
		if key := v[4*i : 4*i+4]; key[1] == 0 {
			keys[uint16(key[0])] = uint16(key[3])
		}
	}
	return keys, nil
}

// locate puts the raster in its place and reads what the keys say.
func (f *file) locate(d *directory, r *Raster) error {
	keys, err := d.geoKeys()
	if err != nil {
		return err
	}
	if m, ok := keys[keyModelType]; ok && m != modelProjected && m != userDefined {
		return unread("project the grid to a plane coordinate system", "coordinates that are no eastings and northings (model type %d)", m)
	}
	if err := f.checkUnits(keys); err != nil {
		return err
	}
	switch kind, ok := keys[keyRasterType]; {
	case !ok:
	case kind == pixelIsArea || kind == pixelIsPoint:
		r.Point, r.Stated = kind == pixelIsPoint, true
	default:
		return broken("raster type %d is neither area nor point", kind)
	}
	r.CRS, r.VerticalCRS = crs(keys[keyProjectedCRS]), crs(keys[keyVerticalCRS])
	a, err := d.affine()
	if err != nil {
		return err
	}
	if !r.Point { // the corner of the cell was given
		a.x += a.stepX / 2
		a.y -= a.stepY / 2
	}
	return f.lay(&r.Levels, a.x, a.y, a.stepX, a.stepY)
}

// crs names a coordinate system by its number; its description may hold names
// of software and is not looked at.
func crs(code uint16) string {
	switch {
	case code == 0:
		return ""
	case code == userDefined:
		return "user-defined"
	case code >= firstUnassigned:
		return fmt.Sprintf("private code %d", code)
	}
	return fmt.Sprintf("EPSG:%d", code)
}

// unitOf returns the length in metres of a unit by its EPSG number.
func unitOf(code uint16) (metres float64, name string, ok bool) {
	switch code {
	case 9001:
		return 1, "metres", true
	case 9002:
		return 0.3048, "international feet", true
	case 9003:
		return 1200.0 / 3937, "US survey feet", true
	}
	return 0, fmt.Sprintf("unit EPSG:%d", code), false
}

// sameUnit is the relative difference below which two units are one: the two
// feet differ by 2e-6.
const sameUnit = 1e-9

// checkUnits holds the units that a file states against the project's: one
// figure cannot be in two units (F08).
func (f *file) checkUnits(keys map[uint16]uint16) error {
	for _, k := range []struct {
		key  uint16
		what string
	}{{keyLinearUnits, "coordinates"}, {keyVerticalUnits, "levels"}} {
		code, stated := keys[k.key]
		if !stated {
			continue
		}
		metres, name, ok := unitOf(code)
		if !ok {
			return unread("convert the grid to metres or feet", "%s in %s", k.what, name)
		}
		if math.Abs(metres-f.unit) > sameUnit*metres {
			return &fault{code: "F08", help: "let survey.units name the unit of the file, for coordinates and levels alike",
				message: fmt.Sprintf("the file says that its %s are in %s; the project reads them in units of %s m", k.what, name, short(f.unit))}
		}
	}
	return nil
}

// affine is the place that a file gives for the corner (or the centre, where a
// cell is a point) of its north-west cell, and the steps east and south.
type affine struct{ x, y, stepX, stepY float64 }

// affine reads where the picture lies: a tie point with a scale, or a matrix.
func (d *directory) affine() (affine, error) {
	scale, err := d.doubles(tagPixelScale, 3)
	if err != nil {
		return affine{}, err
	}
	ties, err := d.doubles(tagTiepoint, 6*1024)
	if err != nil {
		return affine{}, err
	}
	m, err := d.doubles(tagTransformation, 16)
	if err != nil {
		return affine{}, err
	}
	switch {
	case len(scale) >= 2 && len(ties) >= 6:
		i, j, x, y := ties[0], ties[1], ties[3], ties[4]
		return affine{x - i*scale[0], y + j*scale[1], scale[0], scale[1]}.checked()
	case len(m) == 16 && (m[1] != 0 || m[4] != 0):
		return affine{}, unread("turn the grid so that its rows run from west to east", "a raster that is turned against grid north")
	case len(m) == 16:
		return affine{m[3], m[7], m[0], -m[5]}.checked()
	case len(ties) > 6:
		return affine{}, unread("resample the grid to rows and columns of equal cells", "a raster placed by %d control points", len(ties)/6)
	}
	return affine{}, unread("write the place into the file, by a tie point and a scale", "a TIFF that does not say where it lies")
}

// checked refuses mirrored pictures.
func (a affine) checked() (affine, error) {
	if a.stepX < 0 || a.stepY < 0 {
		return a, unread("write the grid with rows from north to south, west to east", "a raster whose rows run from south to north or from east to west")
	}
	return a, nil
}

// noData reads the marked no-data value, and refuses levels that are scaled
// or shifted: read as they are they would be wrong in silence.
func (d *directory) noData(r *Raster) error {
	about := strings.ToLower(d.text(tagDescribedValues, 1<<20))
	for _, role := range []string{`role="scale"`, `role="offset"`} {
		if strings.Contains(about, role) {
			return unread("write the levels themselves into the file", "levels that are stored scaled or shifted (tag %d)", tagDescribedValues)
		}
	}
	text := strings.TrimSpace(strings.ReplaceAll(d.text(tagNoData, 64), "\x00", " "))
	if text == "" {
		return nil
	}
	v, err := strconv.ParseFloat(text, 64)
	if err != nil && !math.IsInf(v, 0) {
		return broken("the no-data value %q (tag %d) is no number", text, tagNoData)
	}
	r.NoData = &v
	return nil
}
