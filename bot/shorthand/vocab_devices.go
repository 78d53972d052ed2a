package shorthand

import "galeward/physio"

func device(d physio.Device) entry { return entry{sense: senseDevice, device: d} }

func mode(m physio.Mode) entry {
	return entry{sense: senseDevice, device: physio.Ventilator, mode: m}
}

// deviceRows are the spellings of devices and modes, makers' words read as
// their kind. Data only.
var deviceRows = []row{
	{entry{sense: senseAir, device: physio.Air}, "ra, room air, roomair, air, on air, off o2, off oxygen, off of o2, off all o2, no o2, no oxygen, off supplemental o2, off the o2, raumluft, aire ambiente, ambient air, on room air, without oxygen, without o2, rm air, aa ambiente, r a, no supplemental o2, no supplemental oxygen, o2 off, unsupplemented, breathing air, ar ambiente, air ambiant"},
	{device(physio.Cannula), "nc, cannula, canula, nasal cannula, nasal canula, nasal cannulae, cannulae, prongs, nasal prongs, np, inp, intranasal prongs, nasals, nasal specs, specs, nasal spectacles, brille, o2 brille, sauerstoffbrille, nasenbrille, lfnc, low flow, lowflow, low flow nc, nasal, nasal o2, lunettes, lunettes nasales, gafas, gafas nasales, canula nasal, cn, low flow cannula, nasal cann, canulla, cateter nasal, nasal catheter, naso"},
	{device(physio.ReservoirCannula), "pendant reservoir, reservoir cannula, pendant, conserving cannula, mustache reservoir, moustache, oxymizer, oxymiser, oximizer, reservoir nc, mustache cannula, reservoir nasal cannula, pendant cannula"},
	{device(physio.PulseDose), "pulse dose, pulsed dose, pulse setting, conserver, oxygen conserver, ocd, pulse dose conserver, poc, portable concentrator, pulse dose concentrator, demand valve, pulse mode"},
	{device(physio.SimpleMask), "simple mask, simple face mask, sfm, sm, face mask, facemask, fm, hudson, hudson mask, mask, o2 mask, oxygen mask, hm, medium concentration mask, plain mask, simple facemask, mc mask, hudsonmaske, maske"},
	{device(physio.ReservoirMask), "nrb, nrm, nrbm, non rebreather, nonrebreather, non rebreathe, non rebreathing mask, nonrebreathing mask, rebreather, reservoir mask, reservoir, trauma mask, non rebreather mask, nonrebreather mask, 100 nrb, partial rebreather, prb, prm, non rb, nrbs, high concentration mask, reservoirmaske, nonre, nr mask, nrb mask, high conc mask, partial nonrebreather, non re breather, non rebreath, bag mask reservoir"},
	{device(physio.Venturi), "venturi, venti, ventimask, venti mask, venturi mask, vm, venturimask, vmask, vent mask, fixed performance mask, air entrainment mask, aem, venturi valve, venturimaske, v mask, entrainment mask"},
	{device(physio.FaceTent), "face tent, facetent, ft mask, aerosol mask, aerosol face mask, afm, cool aerosol, cool mist, misty ox, aerosol"},
	{device(physio.TracheostomyMask), "trach collar, trach mask, tc mask, trachcollar, trachmask, atc, trachy mask, tracheostomy mask, trache mask, tracheostomy collar, trachea mask, trachy collar, htc, trach dome, htm, trachy hood, trach shield, stoma mask, atm, tm"},
	{device(physio.TPiece), "tpiece, t piece, t tube, blow by, blowby, briggs, t bar, tbar, ttube, briggs adapter"},
	{device(physio.Hood), "hood, oxyhood, oxygen hood, head box, headbox, oxy hood, incubator, isolette, head hood, isolette o2"},
	{device(physio.HighFlow), "hfnc, hfno, hfnp, hfn, high flow, highflow, hiflow, hi flow, high flow nc, high flow nasal cannula, high flow nasal, high flow nasal prongs, hfno2, hfnt, hhfnc, hhf, optiflow, airvo, vapotherm, high flow cannula, heated high flow, hi flo, hiflo, nhf, thrive, hhhfnc, hff, high flow o2, high flow oxygen, high flow prongs, hnfc, vapo, hhfnp, hfnox, alto flujo, cnaf, heated high flow nasal cannula, hfnco, high flow nasal oxygen, rapid flow, hi flow nc, hi flow nasal cannula, humidified high flow"},
	{device(physio.CPAPDevice), "cpap, bubble cpap, ncpap, bcpap, nasal cpap, b cpap, n cpap, mask cpap, cpap of, bubble, cpaps, autocpap, apap, helmet cpap"},
	{device(physio.Bilevel), "bipap, bilevel, niv, bpap, nppv, avaps, vpap, bi level, bilevel niv, bipap st, non invasive, noninvasive, nipv, biphasic, ivaps, v60, nimv, nippv, vni, bipaps, nasal bipap, niv mask, mask niv, trilogy, bipap s/t, st mode, si pap, sipap, duopap, bilevel cpap, helmet niv"},
	{entry{sense: senseDevice, device: physio.Bilevel, circ: physio.HomeVentilation}, "home vent, home ventilator, home niv, home bipap, home bilevel, home bpap, home trilogy, home avaps"},
	{device(physio.Ventilator), "vent, ventilator, vented, ventilated, ventilating, intubated, intub, tubed, ett vent, post intub, post intubation, respirator, mech vent, mechanical ventilation, mechanically ventilated, imv, mv vent, on vent, ippv, just intubated, postintubation, reintubated, beatmet, vents, conventional vent, conv vent, conventional, intubation, loaner vent, on the vent, on ventilator, i+v, via ett, re intubated"},
	{mode(physio.AssistCtrl), "ac, acvc, vcac, assist control, acv, cmv, assist ctrl, ac vc, vc ac"},
	{mode(physio.VolumeCtrl), "vcv, volume control, vol control, ac volume, vc, volume ctrl"},
	{mode(physio.PressureCtrl), "pcv, pressure control, acpc, pcac, pc, pcmv, pressure ctrl, ac pc, pc ac, pac, pc mode, press control"},
	{mode(physio.PRVC), "prvc, vcplus, vc plus, autoflow, vol guarantee, volume guarantee, vg, pcvg, apvcmv, apv, vtpc, pc vg, cmv autoflow, apv cmv, vc autoflow"},
	{mode(physio.SIMV), "simv, simv vc, simv pc, simv prvc, simv ps, simvpc, simvvc, vc simv, pc simv"},
	{mode(physio.PressSupport), "psv, ps, pressure support, spont, spontaneous, cpap ps, asb, pressure supp, pressure support ventilation, p support, ps cpap, spont mode, pres support, asv"},
	{mode(physio.APRV), "aprv, bivent, bi vent, airway pressure release"},
	{mode(physio.HFOV), "hfov, hfo, oscillator, oscillated, oscillating, oscillate, oscillatory, high frequency oscillation, high frequency oscillatory ventilation, hf oscillation, hfo vent, on the oscillator, osc, 3100, hifi, oscillation, hfov vent"},
	{mode(physio.HFJV), "hfjv, jet vent, jet, jet ventilator, hfjet"},
	{mode(physio.NAVA), "nava, niv nava"},
	{device(physio.BagMask), "bvm, ambu, bagging, bag mask, bagged, bag valve mask, ambu bag, hand bagging, being bagged, bag valve, neopuff, t piece resuscitator"},
	{entry{sense: senseDevice, device: physio.Chamber, circ: physio.Hyperbaric}, "hyperbaric, hbo, hbot, hyperbarics, chamber, hyperbaric chamber"},
}
