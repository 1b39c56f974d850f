package library

import (
	"bytes"
	"encoding/csv"
	"errors"
	"io"
	"slices"
	"strings"

	"ohmfolio/generator/place"
)

const offersFile = "materials/offers.csv"

// offerColumns are the columns of offers.csv in order.
var offerColumns = []string{"material", "supplier", "form", "size", "price", "currency", "per", "quantity", "date", "valid_until", "metal_base", "certificate", "resistivity_tolerance", "note"}

// offers reads materials/offers.csv; it may be missing.
func (l *loader) offers() {
	src := l.readIfThere(offersFile)
	if src == nil {
		return
	}
	r := csv.NewReader(bytes.NewReader(bytes.TrimPrefix(src.Text, []byte("\ufeff"))))
	r.FieldsPerRecord = len(offerColumns)
	list := place.List{Source: src}
	for first := true; ; first = false {
		row, err := r.Read()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			list.Add("offers-unreadable", place.Error, csvPlace(src, err), "the row cannot be read: "+csvReason(err), "write the "+strings.Join(offerColumns, ", ")+" of each offer, separated by commas; texts with commas in double quotes")
			break
		}
		if first {
			if strings.Join(row, ",") != strings.Join(offerColumns, ",") {
				list.Add("offers-unreadable", place.Error, src.At(1, 1, len(src.Line(1))), "the head is not the one that offers have", "write "+strings.Join(offerColumns, ","))
				break
			}
			continue
		}
		line, column := r.FieldPos(0)
		l.lib.Offers = append(l.lib.Offers, offerOf(row, src.At(line, column, len(row[0]))))
	}
	l.findings = append(l.findings, list.Findings...)
}

func offerOf(row []string, at place.Position) Offer {
	return Offer{Material: row[0], Supplier: row[1], Form: row[2], Size: row[3], Price: row[4], Currency: row[5], Per: row[6], Quantity: row[7],
		Date: row[8], ValidUntil: row[9], MetalBase: row[10], Certificate: row[11], ResistivityTolerance: row[12], Note: row[13], Position: at}
}

func csvPlace(src *place.Source, err error) place.Position {
	var p *csv.ParseError
	if errors.As(err, &p) {
		return src.At(p.Line, p.Column, 1)
	}
	return src.At(1, 1, 1)
}

func csvReason(err error) string {
	var p *csv.ParseError
	if errors.As(err, &p) {
		return p.Err.Error()
	}
	return err.Error()
}

// LeaveOutOffers forgets every price, every rate and what reading offers.csv found: what
// is computed and written afterwards may go to customers. It is for the one who
// loaded the library, before anyone else sees it.
func (l *Library) LeaveOutOffers() {
	l.Offers, l.Settings.Rates = nil, nil
	l.Findings = slices.DeleteFunc(l.Findings, func(f place.Finding) bool { return f.Position.File == offersFile })
}
