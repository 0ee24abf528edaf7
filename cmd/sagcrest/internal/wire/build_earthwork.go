package wire

import (
	"sagcrest/earthwork"
)

func (b builder) earthwork() Earthwork {
	q := &b.Quantities
	e := Earthwork{Totals: b.totals(), Intervals: []Interval{}, Mass: Mass{State: string(b.Project.Request.MassState)}}
	for _, v := range q.Between {
		if v.Excepted {
			continue
		}
		e.Intervals = append(e.Intervals, Interval{From: b.place(v.From), To: b.place(v.To),
			CutBank: volumeIf(v.Known, float64(v.Cut)), FillCompacted: volumeIf(v.Known, float64(v.Fill)), Strip: volumeIf(v.Known, v.Strip)})
	}
	if q.Mass != nil {
		ordinates, points := []Ordinate{}, []BalancePoint{}
		for i, s := range q.Mass.Stations {
			ordinates = append(ordinates, Ordinate{b.place(s), Volume(q.Mass.Values[i])})
		}
		for _, s := range q.Mass.BalancePoints() {
			points = append(points, BalancePoint{b.place(s)})
		}
		e.Mass = Mass{string(q.Mass.State), &ordinates, &points}
	}
	return e
}

func (b builder) totals() Totals {
	q := &b.Quantities
	t := Totals{
		CutBank: volumeIf(q.Known, float64(q.Cut)), FillCompacted: volumeIf(q.Known, float64(q.Fill)),
		Strip: volumeIf(q.Known, q.Strip), Respread: volumeIf(q.Known, q.Respread),
		PayMethod: string(q.Method), Materials: []Material{},
	}
	for i, m := range q.Methods {
		w := Method{Name: string(earthwork.Methods()[i]), CutBank: volumeIf(q.Known, float64(m.Cut)),
			FillCompacted: volumeIf(q.Known, float64(m.Fill)), Strip: volumeIf(q.Known, q.Strip),
			Slivers: volumeIf(q.Known, float64(m.SliverCut)+float64(m.SliverFill))}
		t.Methods = append(t.Methods, w)
	}
	for _, m := range q.Materials {
		w := Material{CutBank: volumeIf(q.Known, float64(m.Cut))}
		if id := string(m.Material.ID); id != "" {
			w.Name = &id
		}
		if m.Compacted != nil {
			w.CutCompacted = volumeIf(q.Known, float64(*m.Compacted))
		}
		if m.Loose != nil {
			w.CutLoose = volumeIf(q.Known, float64(*m.Loose))
		}
		t.Materials = append(t.Materials, w)
	}
	return t
}

func (b builder) land() (l Land) {
	q := &b.Quantities
	for side, take := range []*Take{&l.Left, &l.Right} {
		beyond := []Beyond{}
		for _, x := range b.Beyond {
			if x.Left == (side == 0) {
				beyond = append(beyond, Beyond{b.place(x.From), b.place(x.To), Fine(x.Most)})
			}
		}
		take.Take, take.Beyond = fineIf(q.Known, q.Land[side]), &beyond
	}
	return l
}

func (b builder) cost() *Cost {
	if b.Bill == nil {
		return nil
	}
	c := &Cost{Currency: b.Project.Prices.Currency, Lines: []Line{}, Method: string(b.Quantities.Method)}
	money := func(v *float64) *Volume {
		if v == nil {
			return nil
		}
		return volume(*v)
	}
	for _, l := range b.Bill.Lines {
		c.Lines = append(c.Lines, Line{l.Item, volumeIf(l.Quantity.Known, l.Quantity.Value), l.Unit, money(l.Rate), money(l.Amount)})
	}
	c.Total = money(b.Bill.Total)
	return c
}
