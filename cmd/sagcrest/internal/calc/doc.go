// Package calc does one desk calculation at a time, with its working.
//
// In come a topic's name, its inputs as a JSON object and the system of units
// that bare numbers are in. Then
//
//  1. decode fills the topic's input struct; names, units and required fields
//     come from its tags, and a misspelt name is answered with the nearest
//     (decode.go, number.go);
//  2. the topic calls the domain and copies what comes back; a working of
//     formula, numbers put in and result is written along the way (working.go);
//  3. what cannot be is a Fault that names the field.
//
// Out go a result and its steps. The list of topics is explicit (topics.go).
// Numbers are in the units of the call, in and out: a formula that is printed
// with one coefficient per system is used with that system's.
package calc
