package raster

// undo takes out the differences as which a chunk is stored, row by row.
func (u *unpacker) undo(b []byte) {
	stride := u.width * u.size
	for ; len(b) > 0; b = b[stride:] {
		switch u.predictor {
		case horizontal:
			u.addAlong(b[:stride])
		case floatingByByte:
			u.weave(b[:stride])
		}
	}
}

// addAlong undoes horizontal differencing (TIFF 6.0, section 14): each sample
// is stored as its difference to the one before it in the row, as a whole
// number that wraps around, whatever its format.
func (u *unpacker) addAlong(row []byte) {
	switch u.size {
	case 2:
		for at := 2; at < len(row); at += 2 {
			u.order.PutUint16(row[at:], u.order.Uint16(row[at:])+u.order.Uint16(row[at-2:]))
		}
	case 4:
		for at := 4; at < len(row); at += 4 {
			u.order.PutUint32(row[at:], u.order.Uint32(row[at:])+u.order.Uint32(row[at-4:]))
		}
	case 8:
		for at := 8; at < len(row); at += 8 {
			u.order.PutUint64(row[at:], u.order.Uint64(row[at:])+u.order.Uint64(row[at-8:]))
		}
	}
}

// weave undoes floating-point differencing (TIFF Technical Note 3, 2005): the
// row holds first the highest byte of every sample, then the next, down to the
// lowest, and all of them as differences to the byte before.
func (u *unpacker) weave(row []byte) {
	for at := 1; at < len(row); at++ {
		row[at] += row[at-1]
	}
	u.row = append(u.row[:0], row...)
	for i := range u.width {
		for k := range u.size {
			row[i*u.size+k] = u.row[k*u.width+i]
		}
	}
}
