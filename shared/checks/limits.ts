/**
 * The numbers rules compare with: defaults that an office may set otherwise, each with its source. [P] is common practice or
 * an engineer's judgement and no standard; [M] a named standard quoted from memory; [F] seen in a published page.
 */
import { PTO_SHARE } from '../trial/facts.ts'

interface Limit {
  value: number
  unit: string
  source: string
}

const CERTAINTY = { F: 'published', M: 'from memory', P: 'common practice' } as const
export type Certainty = (typeof CERTAINTY)[keyof typeof CERTAINTY]

/** How sure a source is, by the tag it begins with. */
export const certaintyOf = (source: string): Certainty => CERTAINTY[/^\[([FMP])\]/.exec(source)?.[1] as keyof typeof CERTAINTY]

/** "jar lowest" for jar_lowest_ml: the unit is said beside the number. */
export const limitWords = (name: string): string =>
  name.replace(/_(ml|min|pct|deg|kmh|cm|km|c|h|s|l_kwh)$/, '').replaceAll('_', ' ')

const limit = (value: number, unit: string, source: string): Limit => ({ value, unit, source })

export const LIMITS = {
  clock_slack_min: limit(5, 'min', '[P] jar read within 5 min of start and end'),
  run_low_min: limit(20, 'min', '[P]'),
  run_high_min: limit(240, 'min', '[P]'),
  late_days: limit(30, 'd', '[P]'),
  kit_check_months: limit(12, 'months', '[P]'),
  jar_lowest_ml: limit(500, 'mL', '[P] the outlet uncovers and air is drawn'),
  by_hand_stop_pct: limit(10, '%', '[P]'),
  fuel_u_doubt_pct: limit(10, '%', '[M] JCGM 100, jar resolution'),
  fuel_u_stop_pct: limit(20, '%', '[M] JCGM 100, jar resolution'),
  area_by_hand_pct: limit(1, '%', '[P]'),
  rate_by_hand_pct: limit(1, '%', '[P]'),
  unit_match_pct: limit(0.5, '%', '[P]'),
  hour_meter_base_h: limit(0.1, 'h', '[P] one step of an electronic meter'),
  hour_meter_share: limit(0.05, '', '[P]'),
  hour_meter_mechanical_low: limit(0.5, '', '[P] counts at rated speed'),
  hour_meter_mechanical_high: limit(1.15, '', '[P]'),
  slip_stop_low_pct: limit(-2, '%', '[P] no negative slip under pull'),
  slip_stop_high_pct: limit(35, '%', '[P]'),
  slip_doubt_2wd_pct: limit(20, '%', '[F] manuals: 10 to 15 for 2WD'),
  slip_doubt_4wd_pct: limit(18, '%', '[F] manuals: 8 to 12 for 4WD'),
  slip_note_low_pct: limit(3, '%', '[P]'),
  slip_note_high_pct: limit(15, '%', '[M] wheel limit of OECD Code 2'),
  roll_match_pct: limit(6, '%', '[P]'),
  width_low: limit(0.8, '', '[P]'),
  width_high: limit(1.05, '', '[P]'),
  plough_width_low: limit(0.85, '', '[P]'),
  plough_width_high: limit(1.15, '', '[P]'),
  width_stop_low: limit(0.5, '', '[P]'),
  width_stop_high: limit(1.25, '', '[P]'),
  gear_speed_pct: limit(10, '%', '[P]'),
  no_slip_speed: limit(1.03, '', '[P]'),
  speed_low_kmh: limit(1.5, 'km/h', '[P]'),
  speed_high_kmh: limit(12, 'km/h', '[P]'),
  speed_doubt_low_kmh: limit(0.5, 'km/h', '[P]'),
  speed_doubt_high_kmh: limit(15, 'km/h', '[P]'),
  road_low_kmh: limit(5, 'km/h', '[P] transport'),
  road_high_kmh: limit(40, 'km/h', '[P] transport, a tractor on a road'),
  road_doubt_high_kmh: limit(60, 'km/h', '[P] transport'),
  speed_band_share: limit(0.4, '', '[P] around the typical range of D497 table 3 [M]'),
  timed_cv_note_pct: limit(5, '%', '[P]'),
  timed_cv_doubt_pct: limit(10, '%', '[P]'),
  tyre_pair_doubt_pct: limit(10, '%', '[P]'),
  tyre_pair_unsafe_pct: limit(25, '%', '[P]'),
  pto_share_of_rated: limit(PTO_SHARE, '', '[P] where no test report is known'),
  fuel_cap_l_kwh: limit(0.316 * 1.05, 'L/kWh', '[F] full load of D497.7, and 5 %'),
  fuel_cap_stop_l_kwh: limit(0.423, 'L/kWh', '[F] full load of D497.4'),
  fuel_floor_l_kwh: limit(0.05, 'L/kWh', '[P] near idle'),
  load_model_pct: limit(35, '%', '[P] the model is rough'),
  band_note_low: limit(0.65, '', '[F] Iowa State A3-27: about a third either way'),
  band_note_high: limit(1.35, '', '[F] Iowa State A3-27'),
  band_doubt_low: limit(0.4, '', '[P]'),
  band_doubt_high: limit(2.5, '', '[P]'),
  efficiency_doubt_pct: limit(95, '%', '[P]'),
  efficiency_note_pct: limit(40, '%', '[P]'),
  swath_note_pct: limit(5, '%', '[P]'),
  swath_doubt_pct: limit(10, '%', '[P]'),
  diagonals_pct: limit(2, '%', '[P]'),
  thin_angle_deg: limit(20, '°', '[P] badly conditioned'),
  time_balance_pct: limit(5, '%', '[P]'),
  turn_low_s: limit(4, 's', '[P]'),
  turn_high_s: limit(60, 's', '[P]'),
  depth_cv_note_pct: limit(15, '%', '[P]'),
  depth_cv_doubt_pct: limit(25, '%', '[P]'),
  depth_wild: limit(5 * 1.4826, 'MAD', '[P] five robust deviations'),
  rule_reach_cm: limit(30, 'cm', '[P] the 30 cm rule of the kit'),
  depths_wanted: limit(10, '', '[P]'),
  widths_wanted: limit(5, '', '[P]'),
  slips_wanted: limit(2, '', '[P]'),
  copied_depths: limit(8, '', '[P]'),
  copied_cells: limit(8, '', '[P]'),
  travel_kmh: limit(60, 'km/h', '[P]'),
  density_low: limit(780, 'kg/m³', '[P]'),
  density_high: limit(900, 'kg/m³', '[P]'),
  density_note_low: limit(820, 'kg/m³', '[F] EN 590 pages'),
  density_note_high: limit(845, 'kg/m³', '[F] EN 590 pages'),
  temp_fall_c: limit(5, '°C', '[P]'),
  temp_rise_c: limit(25, '°C', '[P]'),
  temp_hot_c: limit(65, '°C', '[P]'),
  temp_needed_air_c: limit(35, '°C', '[P]'),
  temp_needed_min: limit(60, 'min', '[P]'),
  grubbs_alpha: limit(0.01, '', '[P] two-sided'),
  robust_z: limit(3.5, '', '[M] Iglewicz and Hoaglin'),
  droop_pct: limit(15, '%', '[P]'),
  pto_rpm_pct: limit(10, '%', '[P]'),
  warmup_min: limit(15, 'min', '[P] a cold engine burns more'),
  photo_km: limit(5, 'km', '[P]'),
  moisture_low_pct: limit(3, '%', '[P]'),
  moisture_high_pct: limit(45, '%', '[P]'),
} as const satisfies Record<string, Limit>

export type LimitName = keyof typeof LIMITS
