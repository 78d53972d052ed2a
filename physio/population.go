package physio

// The tables of the populations: reference ranges where healthy people were
// measured, accepted ranges where care has its own (newborns and preterm
// babies), each with where it was published. The published numbers stand in
// testdata/tables/populations.csv, and the tests hold each table against them.

// Ranges are what one population is judged by: the reference ranges at its
// usual barometric pressure, and the point on which the expected responses of
// acid-base disorders are anchored.
type Ranges struct {
	PHLow, PHHigh       float64
	PaCO2Low, PaCO2High float64 // mmHg
	HCO3Low, HCO3High   float64 // mmol/L
	// Anchor is the undisturbed state.
	Anchor Anchor
	// Responses says that the adult rules of expected response hold here.
	Responses bool
	// PaO2 says that the adult scale of PaO2 holds here.
	PaO2 bool
	// Source names where the ranges come from.
	Source string
}

// Adults and pregnancy.
var (
	// adultRanges: common practice at sea level. 182 healthy adults gave pH
	// 7.38-7.46, PaCO2 32-45 mmHg, HCO3 21-27 mmol/L (Klaestrup 2011).
	adultRanges = Ranges{
		PHLow: 7.35, PHHigh: 7.45, PaCO2Low: 35, PaCO2High: 45, HCO3Low: 22, HCO3High: 26,
		Anchor: Anchor{PaCO2: 40, HCO3: 24, SBE: 0}, Responses: true, PaO2: true,
		Source: "adult arterial ranges at sea level, common practice; Klaestrup 2011 measured 32-45 mmHg",
	}
	// firstTrimester: PaCO2 27-32 (mean 28) and pH 7.40-7.44 when the fall is
	// done (Reddi 2014), about week 12. The upper ends reach towards the adult
	// table because before that the fall is under way; how far is ours.
	firstTrimester = Ranges{
		PHLow: 7.36, PHHigh: 7.46, PaCO2Low: 27, PaCO2High: 36, HCO3Low: 17, HCO3High: 23,
		Anchor: Anchor{PaCO2: 31, HCO3: 20.5, SBE: -3}, Responses: true, PaO2: true,
		Source: "first trimester: Reddi 2014 (PaCO2 27-32 mmHg), the upper ends carried towards the adult table",
	}
	// secondTrimester: 39 women, PaCO2 34 (SD 4), HCO3 18.5 (1.5), pH 7.373
	// (Soothill 1986); no difference between trimesters in Sunyal 2008.
	secondTrimester = Ranges{
		PHLow: 7.36, PHHigh: 7.46, PaCO2Low: 27, PaCO2High: 36, HCO3Low: 17, HCO3High: 22,
		Anchor: Anchor{PaCO2: 31, HCO3: 20, SBE: -3.5}, Responses: true, PaO2: true,
		Source: "second trimester: Soothill 1986 (39 women, PaCO2 34, SD 4 mmHg); Sunyal 2008",
	}
	// pregnantRanges: a review prints pH 7.40-7.47, PaCO2 28-32, HCO3 18-22
	// (J Basic Clin Physiol Pharmacol 2022). PaCO2 is wider here because the
	// means of healthy women lie at 26.6 (Hankins 1996), 27.3 (Lim 1976) and 33
	// mmHg (Brandis): the printed range is one of means, not of women.
	pregnantRanges = Ranges{
		PHLow: 7.40, PHHigh: 7.47, PaCO2Low: 26, PaCO2High: 34, HCO3Low: 17, HCO3High: 22,
		Anchor: Anchor{PaCO2: 30, HCO3: 20, SBE: -3.5}, Responses: true, PaO2: true,
		Source: "late pregnancy: Lim 1976, Hankins 1996, Brandis, review of 2022 (means of PaCO2 from 26.6 to 33 mmHg)",
	}
)

// Children, by the bands in which laboratories print them. A third band, of
// school age, has no published PaCO2 of its own: bicarbonate only rises slowly
// with age (Burritt 1990).
var (
	// infantRanges, 29 days to 2 years: pH 7.34-7.46, PaCO2 26-41 (laboratory
	// list of a hospital group), HCO3 16-23 (Van Leeuwen) or 19-24 (list of
	// paediatric values). The anchor is from memory.
	infantRanges = Ranges{
		PHLow: 7.34, PHHigh: 7.46, PaCO2Low: 27, PaCO2High: 41, HCO3Low: 17, HCO3High: 24,
		Anchor: Anchor{PaCO2: 34, HCO3: 21, SBE: -3}, PaO2: true,
		Source: "29 days to 2 years: laboratory lists (pH 7.34-7.46, PaCO2 26-41 mmHg, HCO3 16-24 mmol/L)",
	}
	// childRanges, 2 to 15 years: pH 7.35-7.45, PaCO2 33-43 (the same list);
	// HCO3 18-25 (list of paediatric values), base excess -4 to 2. The upper
	// PaCO2 stays the adult one, so that a child is not called high at a value
	// no other table calls high.
	childRanges = Ranges{
		PHLow: 7.35, PHHigh: 7.45, PaCO2Low: 33, PaCO2High: 45, HCO3Low: 19, HCO3High: 26,
		Anchor: Anchor{PaCO2: 38, HCO3: 23, SBE: -1}, Responses: true, PaO2: true,
		Source: "2 to 15 years: laboratory lists (PaCO2 33-43 mmHg, HCO3 18-25 mmol/L) up to the adult upper end",
	}
)

// Newborns. These are ranges that care accepts: a healthy newborn breathes to
// 27-40 mmHg, but a PaCO2 below 35 is held against worse outcomes of the brain
// (Pappas 2011), so that the low end stays there.
var (
	// newbornRanges, term: pH from 7.30 and PaCO2 35-45, somewhat higher
	// accepted (Gomella, handbook of neonatology); above 6.6 kPa = 50 mmHg
	// counted as hypercapnia (Nadeem 2010).
	newbornRanges = Ranges{
		PHLow: 7.30, PHHigh: 7.45, PaCO2Low: 35, PaCO2High: 50, HCO3Low: 17, HCO3High: 26,
		Anchor: Anchor{PaCO2: 40, HCO3: 22, SBE: -2},
		Source: "term newborn: pH from 7.30, PaCO2 35-45 mmHg and somewhat above (Gomella); Pappas 2011; Nadeem 2010",
	}
	// firstDayRanges: the same, with pH 7.25-7.43 on the first day (list of
	// paediatric values); 7.30 (SD 0.04) a quarter of an hour after birth in
	// 132 well term babies (BMC Pediatr 2022).
	firstDayRanges = Ranges{
		PHLow: 7.25, PHHigh: 7.45, PaCO2Low: 35, PaCO2High: 50, HCO3Low: 17, HCO3High: 26,
		Anchor: Anchor{PaCO2: 40, HCO3: 21, SBE: -4},
		Source: "term newborn, first day: pH from 7.25 (list of paediatric values; BMC Pediatr 2022), PaCO2 as later",
	}
	// pretermRanges: 45-55 against 35-45 mmHg were the arms of Mariani 1999,
	// with pH 7.25 for extubation; 40-50, 45-55 and 50-60 mmHg by age the usual
	// arm of Thome 2015.
	pretermRanges = Ranges{
		PHLow: 7.25, PHHigh: 7.45, PaCO2Low: 35, PaCO2High: 55, HCO3Low: 18, HCO3High: 26,
		Anchor: Anchor{PaCO2: 45, HCO3: 22, SBE: -2},
		Source: "preterm: PaCO2 35-55 mmHg and pH from 7.25 (Mariani 1999; Thome 2015)",
	}
	// cordRanges, artery: 160 elective caesareans gave pH 7.18-7.42, PCO2
	// 33-67, HCO3 16-31 (J Med Assoc Thai 2016). Labour alone widens it: in
	// 15,073 vigorous babies the 2.5th centile of pH was 7.10 (Helwig 1996).
	cordRanges = Ranges{
		PHLow: 7.18, PHHigh: 7.40, PaCO2Low: 33, PaCO2High: 66, HCO3Low: 17, HCO3High: 27,
		Anchor: Anchor{PaCO2: 50, HCO3: 22.5, SBE: -4},
		Source: "cord artery: J Med Assoc Thai 2016 (160 elective caesareans); Helwig 1996",
	}
	// cordVeinRanges: pH 7.28-7.44, PCO2 31-57, HCO3 19-30 in the same 160;
	// 7.25-7.45 and 27-49 in a laboratory handbook (Van Leeuwen); means 7.34
	// and 5.45 kPa (SD 0.93) in Helwig 1996.
	cordVeinRanges = Ranges{
		PHLow: 7.25, PHHigh: 7.45, PaCO2Low: 27, PaCO2High: 55, HCO3Low: 17, HCO3High: 28,
		Anchor: Anchor{PaCO2: 41, HCO3: 22, SBE: -3},
		Source: "cord vein: J Med Assoc Thai 2016; Van Leeuwen; Helwig 1996",
	}
)

// climb is how the usual PaCO2 of residents falls with height, in mmHg: by
// atSea below the round value of the table, and by perKm a kilometre.
type climb struct{ atSea, perKm float64 }

var (
	// adultClimb is the line 38.3 - 2.5 x height of Vazquez and Perez-Padilla
	// 2000 for the acclimatised; the means of seven series of residents from
	// 1605 to 4000 m lie within 5 mmHg of it.
	adultClimb = climb{atSea: 1.7, perKm: 2.5}
	// pregnantClimb is flatter, as the fall of pregnancy is there already: 26.6
	// mmHg at 1388 m (Hankins 1996) and 24 at 4200 m (Reddi 2014), a straight
	// line through these two and the 30 of sea level.
	pregnantClimb = climb{perKm: 1.5}
)

const (
	altitudeShiftFrom     = 1000.0 // m: below it the shift is inside a reading's error
	hco3FallPerMmHg       = 0.41   // mmol/L, chronic hypocapnia, Krapf 1991
	altitudePressureBelow = 680.0  // mmHg: the pressure at about 1000 m
)

// atAltitude shifts ranges to residents of h metres. The upper ends keep the
// margin above the line that the table has at sea level, because natives of
// high places keep a PaCO2 somewhat above it. Infants and newborns are left as
// they are: no series was found.
func (r Ranges) atAltitude(h float64, c climb) Ranges {
	if h < altitudeShiftFrom || !r.Responses {
		return r
	}
	top := c.perKm * h / 1000
	fall := c.atSea + top
	r.PaCO2Low -= fall
	r.PaCO2High -= top
	r.HCO3Low -= hco3FallPerMmHg * fall
	r.HCO3High -= hco3FallPerMmHg * top
	r.Anchor.PaCO2 -= fall
	r.Anchor.HCO3 -= hco3FallPerMmHg * fall
	r.Anchor.SBE -= hco3FallPerMmHg * fall
	r.Source += ", shifted for altitude"
	return r
}

// Ages at which one table hands over to the next, years.
const (
	infantBelow  = 2.0         // laboratory lists
	firstDayUpTo = 1.5 / 365.0 // "1 day old"; an age of 0 is one that is not known
)

// rangesFor chooses the table of a population. Age is in years, 0 when not
// known; h is the altitude in metres.
func rangesFor(p Population, age float64, trimester int, h float64) Ranges {
	switch p {
	case Pregnant:
		return trimesterRanges(trimester).atAltitude(h, pregnantClimb)
	case Child:
		if age > 0 && age < infantBelow {
			return infantRanges.atAltitude(h, adultClimb)
		}
		return childRanges.atAltitude(h, adultClimb)
	case Newborn:
		if age > 0 && age <= firstDayUpTo {
			return firstDayRanges
		}
		return newbornRanges
	case Preterm:
		return pretermRanges
	}
	return adultRanges.atAltitude(h, adultClimb)
}

// trimesterRanges takes an undated pregnancy for a late one: it is the one that
// reaches a respiratory department.
func trimesterRanges(trimester int) Ranges {
	switch trimester {
	case 1:
		return firstTrimester
	case 2:
		return secondTrimester
	}
	return pregnantRanges
}

// cordRangesOf chooses the table of a cord sample: the artery's, which is the
// wider one, unless the vein was said.
func cordRangesOf(s Site) Ranges {
	if s == CordVeinSite {
		return cordVeinRanges
	}
	return cordRanges
}
