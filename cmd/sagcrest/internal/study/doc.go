// Package study runs the chain of one road: geometry → sections → drainage →
// quantities → bill → findings. One file a stage; each converts, calls the
// domain and copies what comes back, without formulas of its own.
//
//  1. Open reads the project and its survey (open.go);
//  2. Run lays alignment, grade line and ground (geometry.go), cuts the pay
//     stations (sections.go), lays culverts (drainage.go), measures and bills
//     (quantities.go, bill.go);
//  3. every doubt on the way becomes a finding; accepted ones are marked
//     (findings.go, accept.go).
//
// Out goes an Outcome: the open results of every stage for one alternative. The
// documents of package wire and the sheets of package report are made from it.
package study
