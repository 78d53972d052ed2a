package shorthand

func unit(u string) entry { return entry{sense: senseUnit, unit: u} }

// The units, by the name that the conversions know them under.
const (
	uMmHg    = "mmhg"
	uKPa     = "kpa"
	uPercent = "%"
	uLitre   = "l" // litres, or litres a minute behind a flow
	uLPM     = "l/min"
	uLPMKg   = "l/kg" // litres a minute for each kg
	uML      = "ml"
	uMLKg    = "ml/kg"
	uKg      = "kg"
	uGram    = "g"
	uPound   = "lb"
	uCm      = "cm"
	uMetre   = "m"
	uInch    = "in"
	uFoot    = "ft"
	uMmolL   = "mmol/l"
	uNmolL   = "nmol/l"
	uGL      = "g/l"
	uGDL     = "g/dl"
	uMgDL    = "mg/dl"
	uC       = "c"
	uF       = "f"
	uH2O     = "cmh2o"
	uHz      = "hz"
	uWeek    = "wk"
	uYear    = "yo"
	uPerMin  = "/min"
	uMbar    = "mbar"
	uTime    = "time" // any unit of time: the number is a duration
	uMonth   = "mo"
	uDay     = "do"
)

// unitRows are the spellings of units. Data only.
var unitRows = []row{
	{unit(uMmHg), "mmhg, mm hg, torr, mm, mmhgs, hg mm"},
	{unit(uKPa), "kpa, kpas, kilopascal, kilopascals, k pa"},
	{unit(uPercent), "percent, pct, per cent, prozent, procent, perc, pc o2"},
	{unit(uLPM), "lpm, l/min, litres per minute, liters per minute, l per min, litres a minute, liters a minute, lmin, liters per min, litres per min, lt min, slpm, lpms, ltrs per min"},
	{unit(uLitre), "l, liters, litres, liter, litre, ltr, ltrs, lt, lts"},
	{unit(uLPMKg), "l/kg, l per kg, l kg, lpm per kg, lpm kg, l kg min, l per kg per min, litres per kg, liters per kg"},
	{unit(uML), "ml, mls, cc, ccs, milliliters, millilitres"},
	{unit(uMLKg), "per kg, per kilo, ml/kg, mlkg, cc/kg, ml per kg, mls/kg, ml kg, mls per kg"},
	{unit(uKg), "kg, kgs, kilo, kilos, kilogram, kilograms"},
	{unit(uGram), "g, gm, gms, gram, grams, gr"},
	{unit(uPound), "lb, lbs, pounds, pound"},
	{unit(uCm), "cm, cms, centimetres, centimeters"},
	{unit(uMetre), "metres, meters, metre, meter, mtr, mts, masl, m asl, m above sea level, metres above sea level, meters above sea level"},
	{unit(uInch), "in, inches, inch, ins"},
	{unit(uFoot), "ft, feet, foot"},
	{unit(uMmolL), "mmol/l, mmol, meq, mmoll, meql, mmol l, meq l"},
	{unit(uNmolL), "nmol/l, nmol, nanomol, nmoll"},
	{unit(uGL), "g/l, gl"},
	{unit(uGDL), "g/dl, gdl, gm/dl"},
	{unit(uMgDL), "mg/dl, mgdl, mgs/dl"},
	{unit(uC), "c, degc, celsius, deg c, degrees, degrees c, deg, centigrade"},
	{unit(uF), "degf, fahrenheit, deg f, degrees f"},
	{unit(uH2O), "cmh2o, cm h2o, cmh20, cms h2o, cmsh2o, h2o, cwp, cm h20, cmh2os"},
	{unit(uMbar), "mbar, hpa, mb"},
	{unit(uWeek), "wk, wks, week, weeks, wk old, wks old, week old, weeks old, weeker, wkr, wker, weekers, w ga, wk ga, weeks ga, weeks gestation, wks gestation, week gestation, weeks gestational age"},
	{unit(uYear), "yo, yr, yrs, year, years, y, year old, years old, yr old, yrs old, yom, yof, y o, years of age"},
	{unit(uMonth), "mo, mth, months, month, mos, month old, months old, mo old"},
	{unit(uDay), "days, day old, days old, d old"},
	{unit(uPerMin), "/min, per min, per minute, breaths, breaths a minute, breaths per minute, breaths/min, a minute, min-1, times a minute"},
	{unit(uTime), "min, mins, minute, minutes, h, hr, hrs, hour, hours, sec, secs, second, seconds, d, s, ms, hrs ago, min ago, mins ago, hr ago"},
}
