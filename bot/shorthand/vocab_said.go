package shorthand

import "galeward/physio"

func blood(b physio.Blood) entry       { return entry{sense: senseSaid, blood: b} }
func circ(c physio.Circumstance) entry { return entry{sense: senseSaid, circ: c} }
func people(p physio.Population) entry { return entry{sense: senseSaid, pop: p} }
func sampled(b physio.Blood, s physio.Site) entry {
	return entry{sense: senseSaid, blood: b, site: s}
}

// saidRows are the words that say what blood, what patient and what
// circumstance. Data only.
var saidRows = []row{
	{blood(physio.Arterial), "abg, art, arterial, art line, a line, aline, art gas, arterial gas, artline, radial, femoral art, art stick, arterial line, abgs, arterial blood gas, stick, art. gas, art line gas, a gas, arteriell, arterielle bga, ial, art sample, aline gas, art line sample, arterial sample, gasometria arterial, pal"},
	{blood(physio.Venous), "vbg, venous, ven, venous gas, peripheral venous, vbgs, venous blood gas, pvbg, iv draw, ven gas, venos, venoes, venous sample, peripheral vbg, venosa, mixed up venous, v gas, venous stick"},
	{blood(physio.CentralVenous), "cvc, cvc gas, central venous, central venous gas, central line gas, central vbg, central gas, cvbg, central line, picc gas, picc, cvl gas, central venous sample, cvg, cvl, central vein"},
	{blood(physio.MixedVenous), "mixed venous, mvbg, mvg, mixed venous gas, pa gas, pac gas, swan gas, pa catheter gas, pulmonary artery gas, mvo2 gas, mixed ven, pa cath gas, pa cath, pa line"},
	{blood(physio.Capillary), "cbg, cap gas, capillary, capillary gas, cap, capgas, cbgs, cap blood gas, capillary blood gas, arterialised capillary, arterialized capillary, capillary sample, kapillar, cap sample, bga kapillar"},
	{sampled(physio.Capillary, physio.Heel), "heel stick, heelstick, heel prick, heel, heel gas, heel cap, heelprick, heel stick gas, heel cbg"},
	{sampled(physio.Capillary, physio.Earlobe), "earlobe, ear lobe, earlobe gas, elbg, ear gas, ear lobe gas, elg, ohrlappchen, ohrlaeppchen, earlobe sample, clbg, ear"},
	{sampled(physio.Capillary, physio.Finger), "finger, finger stick, fingerstick, finger cap, fingerprick, finger prick, finger cap gas, finger stick gas, finger gas"},
	{blood(physio.Cord), "cord, cord gas, cord gases, umbilical cord, cord blood gas, cord blood"},
	{sampled(physio.Cord, physio.CordArterySite), "cord art, cord artery, cord arterial, arterial cord, art cord, umbilical artery cord, cord ua, cord a, cord art gas, arterial cord gas, cord artery gas, cord arterial gas"},
	{sampled(physio.Cord, physio.CordVeinSite), "cord ven, cord vein, cord venous, venous cord, ven cord, cord uv, cord v, cord vein gas, cord venous gas, venous cord gas, cord ven gas"},
	{sampled(physio.Arterial, physio.UmbilicalArt), "uac, uac gas, umbilical artery, umb art, ua line, umbilical arterial, ua gas, umbilical arterial line"},
	{sampled(physio.Venous, physio.UmbilicalVein), "uvc, uvc gas, umbilical vein, umb ven, uv line, umbilical venous, uv gas, umbilical venous line"},
	{blood(physio.Intraosseous), "io, io gas, intraosseous, intraosseous gas, io sample, io line, intra osseous"},

	{people(physio.Adult), "adult, grown up, adults"},
	{people(physio.Pregnant), "pregnant, gravid, pregnancy, obstetric, antenatal, preg, gravida, g1p0, parturient, prego, iup, labor, labour, laboring, labouring, expecting, antepartum, intrapartum"},
	{people(physio.Child), "child, peds, paeds, picu, pediatric, paediatric, toddler, kid, infant, ped, paed, pedi, infants, children, schoolchild, teen"},
	{people(physio.Newborn), "dol, day of life, neonate, newborn, nicu, neonatal, term, neo, baby, term baby, newborns, term newborn, term infant, nb, scbu, full term, babe, bub, neonat, neonates"},
	{people(physio.Preterm), "preterm, premie, preemie, prem, premature, elbw, vlbw, preemy, premmie, preterm baby, preterm infant, premature baby, micropreemie, micro preemie, ex prem, premies, preemies, 24 weeker, late preterm"},

	{entry{sense: senseSaid, sex: physio.Male}, "male, man, gentleman, boy, boys, he, gent, guy, males, his"},
	{entry{sense: senseSaid, sex: physio.Female}, "female, woman, lady, girl, she, her, fem, females"},

	{circ(physio.COPD), "copd, coad, aecopd, copder, emphysema, copd'er, copders, chronic bronchitis, aecoad, epoc, bpoc, copd exac, copde, copd exacerbation, known copd"},
	{circ(physio.AsthmaAttack), "asthma, asthmatic, status asthmaticus, acute asthma, asthma attack, bronchospasm, asthma exac, asthma exacerbation, severe asthma, asma, life threatening asthma"},
	{circ(physio.Retainer), "retainer, co2 retainer, ohs, obesity hypoventilation, retains, retaining, chronic retainer, kyphoscoliosis, neuromuscular, als, mnd, dmd, known retainer, chronic hypercapnia, hypercapnic at baseline, myasthenia, duchenne, osa ohs, nmd, osa/ohs, scoliosis, chronic hypercapnic, co2 retention, chronic co2 retainer"},
	{circ(physio.ECMO), "ecmo, vv ecmo, va ecmo, vvecmo, vaecmo, ecls, ecco2r, on ecmo, on circuit"},
	{circ(physio.CPR), "cpr, coding, code blue, arrest, cardiac arrest, compressions, in arrest, during cpr, mid arrest, code, during code, resus, intra arrest, active cpr, ongoing cpr, acls"},
	{circ(physio.PostArrest), "post arrest, rosc, post rosc, postarrest, post cardiac arrest, after arrest, post code, post cpr, post vf arrest, post vf, after rosc"},
	{circ(physio.CyanoticHeart), "single ventricle, cyanotic, cchd, hlhs, fontan, glenn, norwood, tof, tetralogy, cyanotic heart, cyanotic heart disease, univentricular, tga, bt shunt, cyanotic chd, eisenmenger, univent, truncus, mbts"},
	{circ(physio.BrainInjury), "tbi, brain injury, head injury, icp, sah, herniation, herniating, neuro icu, stroke, ich, neurotrauma, traumatic brain injury, raised icp, hie, cooled hie"},
	{circ(physio.Heliox), "heliox, helium, he o2, heliox 70 30, heliox 80 20"},
	{circ(physio.SmokeOrCO), "house fire, smoke, smoke inhalation, co poisoning, carbon monoxide, fire, inhalation injury, burns, co exposure, smoke exposure, co tox, burn"},
	{circ(physio.MetHbCause), "nitrite, poppers, benzocaine, dapsone, methaemoglobinaemia, methemoglobinemia, inhaled no, nitrites, hurricaine, amyl nitrite, lidocaine spray, prilocaine, rasburicase, methylene blue"},
	{circ(physio.JustChanged), "just changed, just increased, just turned up, just went up, just started, just put on, just switched, just now changed, just dropped, just turned down, just went down, just weaned, changed to, just changed to, just placed on, immediately after, just up, just moved to, just bumped, straight after"},
	{circ(physio.Prone), "prone, proned, proning, in prone, prone position"},
	{circ(physio.Shock), "shock, shocked, low output, cardiogenic shock, on pressors, hypotensive, poor perfusion, mottled, cold and clammy"},
	{circ(physio.Shock | physio.Sepsis), "septic shock"},
	{circ(physio.SpontaneousBreathing), "spont breathing, spontaneously breathing, breathing spontaneously, breathing over, overbreathing, breathing over the vent, over breathing, overbreathing the vent"},
	{circ(physio.OpioidOrSedation), "opioid, opioids, narcotic, narcotics, sedated, sedation, opioid overdose, opiate overdose, fentanyl, morphine, propofol, heroin, oversedated, benzo, benzos, post op opioid, pca, opiate, opiates, narced, narcan, methadone, narcotised, narcotized, naloxone, midazolam, oxycodone, hydromorphone"},
	{circ(physio.Ketoacidosis), "dka, ketoacidosis, ketones, ketotic, euglycaemic dka, diabetic ketoacidosis, ketosis"},
	{circ(physio.Sepsis), "sepsis, septic, urosepsis, septicaemia, septicemia"},
	{circ(physio.Transfusion), "transfused, transfusion, massive transfusion, mtp, post transfusion, prbcs"},
	{circ(physio.Anxious), "anxious, panic, anxiety, panicking, panicky, hyperventilating anxious, scared, crying, panic attack, agitated, upset, screaming"},
	{circ(physio.PulmonaryHypertensionNewborn), "pphn, persistent pulmonary hypertension"},
	{circ(physio.TempCorrected), "temp corrected, temperature corrected, corrected to temp, corrected for temp, ph stat, corrected for temperature, corrected to temperature, t corrected, tcorr"},
	{circ(physio.BledInOxygen), "bled in, bleed in, bledin, entrained, o2 bleed, oxygen bleed, bleed o2, bleed oxygen, o2 bleed in, o2 bled in, oxygen bled in, teed in, bled into"},
	{circ(physio.HomeVentilation), "home settings, night settings, nocturnal niv, home vent settings, home machine, nocturnal ventilation, nocturnal bipap"},
}
