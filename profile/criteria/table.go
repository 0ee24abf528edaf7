package criteria

import "math"

// Control is a row of a design table: speed, sight distance, K.
type Control struct{ Speed, Sight, K float64 }

// Criteria lists the tables that can be made.
func Criteria() []string { return []string{"stopping", "passing", "headlight"} }

// passing holds the passing sight distances of AASHTO (2011), from memory, by
// growing speed: from 30 km/h by 10 in metres, from 20 mile/h by 5 in feet.
func passing(s System) (first, step float64, sights []float64) {
	if s == US {
		return 20, 5, []float64{400, 450, 500, 550, 600, 700, 800, 900, 1000, 1100, 1200, 1300, 1400}
	}
	return 30, 10, []float64{120, 140, 160, 180, 210, 245, 280, 320, 355, 395, 440}
}

// Table returns the K values of AASHTO for a criterion, by speed: 20–130 km/h by
// 10, 15–80 mile/h by 5. Stopping: S²/658 (metric), S²/2158 (US); headlight:
// S²/(120 + 3.5S), S²/(400 + 3.5S); both rounded to one decimal and then up to a
// whole number, as printed. Passing: S²/864, S²/2800, nearest whole. ok is false
// for an unknown criterion.
func Table(s System, criterion string) (rows []Control, ok bool) {
	if criterion == "passing" {
		first, step, sights := passing(s)
		for i, d := range sights {
			rows = append(rows, Control{first + float64(i)*step, d, math.Round(d * d / s.pick(864, 2800))})
		}
		return rows, true
	}
	if criterion != "stopping" && criterion != "headlight" {
		return nil, false
	}
	first, last, step := s.pick(20, 15), s.pick(130, 80), s.pick(10, 5)
	for v := first; v <= last; v += step {
		d, _ := s.StoppingDistance(v, 2.5, Braker{Deceleration: s.Deceleration()}, 0)
		k := d.Design * d.Design / s.pick(658, 2158)
		if criterion == "headlight" {
			k = d.Design * d.Design / (s.pick(120, 400) + 3.5*d.Design)
		}
		rows = append(rows, Control{v, d.Design, upFromTenth(k)})
	}
	return rows, true
}

// upFromTenth rounds to one decimal and then up to a whole number.
func upFromTenth(k float64) float64 { return math.Ceil(math.Round(k*10)/10 - 1e-9) }
