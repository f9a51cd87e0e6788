/**
 * Every number that decides between clear and in doubt, and every prior that no layout states. Measured effects are in
 * DEVELOPERS.md (figures on reading).
 */

/**
 * A reading is clear from this posterior on, where something besides its ink (a sum, marks, the clock, a register) speaks for it.
 * On the standard set (60 simulated photos a level): tied readings left to a person 5.5, 6.3 and 17 %; at 0.996 6.5, 7.0 and 18 %
 * with the same two silent ones.
 */
export const CLEAR = 0.99
/**
 * The same where nothing but the ink speaks for it: untied readings left to a person 7.6, 8.3 and 18 % at 0.99 with 2, 3 and 0
 * silent of some 1,400, 1,400 and 1,000; at 0.996 10, 12 and 22 % with 1, 3 and 0. Other writers' fours and nines ask for the room.
 */
export const CLEAR_BY_INK_ALONE = 0.996
/** With a sum that does not hold, its parts must be this sure by their own ink: one of them may be what is wrong. */
export const CLEAR_BESIDE_A_WRONG_SUM = 0.99
/** A sum holds from this posterior on; below, the written result is in doubt. */
export const SUM_HOLDS = 0.95
/** Knowledge may choose only among digits at least this probable in their own box. */
export const DIGIT_ALLOWED = 0.02
/**
 * Of two readings of the same ink that are this nearly as probable the ink favours neither, so what else is known may choose. Where
 * the ink does favour another value, a person looks. On the standard set, before: 23 of 4,430 tied readings, all right.
 */
export const INK_UNDECIDED = 0.67
/**
 * A sum that rests on a part read second best still vouches for its result where that reading has this much of the ink: a slip
 * of the writer that happens to fit a plain second reading is far rarer than such ink (53 of 4,430 tied readings before, 29
 * after, no further silent error).
 */
export const INK_ALLOWS = 0.05
/** Spoiled boxes are rarer on sheets (about 1 in 100) than in training (1 in 7): their share is weighed down by this. */
export const VOID_RARER = 0.1
/**
 * A reading with a box this likely crossed out or written over, by the net's own share, is in doubt. On the standard set at 0.03:
 * caught 88 of 91, 83 of 84, 66 of 66, tied readings left to a person 5.5, 6.2 and 16 %; at 0.05 88, 80 and 66, and 4.7, 5.6 and
 * 15 %. What is missed holds no hint of it: how thick or how much the ink is, beside the writer's other digits, told spoiled
 * boxes from plain ones no better than chance.
 */
export const VOID_DOUBT = 0.03
/** Ink this likely to leave a gap between digits puts the reading in doubt. */
export const GAP_DOUBT = 0.02
/** A tick or choice is clear from this posterior on. */
export const TICK_CLEAR = 0.995

/**
 * The net is wrong now and then where it is surest (2 of 2,637 accepted cells in the trial build): this share of every box is
 * spread over all classes, so that no digit is impossible and a sum can contradict a sure-looking one.
 */
export const NET_HUMILITY = 4e-4

/** Writers' sums that do not hold, and over how many results such a slip spreads. */
export const WRONG_SUM = 0.03
export const WRONG_SUM_SPREAD = 100
/** Over how many results an unreadable part leaves the result open. */
export const UNKNOWN_SPREAD = 3000
/** A result rounded roughly (within 1 % but not to its last place), among results that hold. */
export const ROUGH_RESULT = 0.12
export const ROUGH_SHARE = 0.01
/** A result left blank although its parts are there. */
export const RESULT_BLANK = 0.05

/** Marks: share of readings on half a mark, and finer than the marks allow. */
export const HALF_MARK = 0.08
export const BROKEN_MARK = 0.03
/** Weights of values that are unlikely, or impossible as a measurement yet possible as writing. */
export const UNLIKELY = 0.05
export const IMPOSSIBLE = 0.001
/** A number that the register does not hold. */
export const UNKNOWN_NUMBER = 0.02
/** Clock times and pairs that stand against the expected order or distance. */
export const LATE = 0.05
export const REVERSED = 0.002
export const APART = 0.02
/** A repeat speaks for the others only where it is this sure by itself. */
export const SURE_NEIGHBOUR = 0.9
/** Boxes of a time or date that no clock or calendar knows. */
export const IMPOSSIBLE_FORMAT = 0.003

/** Patterns of a comb less likely than this beside the best are left out; what is left out is added up. */
export const PATTERN_FLOOR = 1e-6
/**
 * What joint weighing leaves out beside the best: states of a tie, and values a held reading is tried at. The second, coarser
 * pair is for groups too open for the first.
 */
export const PRECISIONS = [
  { state: 1e-6, held: 3e-4 },
  { state: 1e-4, held: 5e-3 },
] as const
export const MOST_PATTERNS = 600
/**
 * A group is not decided where the weight left out exceeds what was kept. It comes near only where a sum fails (its weight is then
 * about WRONG_SUM / WRONG_SUM_SPREAD; of the ways left out one in WRONG_SUM_SPREAD or so would hold), and such a result is in
 * doubt either way.
 */
export const MOST_LEFT_OUT = 1
/** A group that needs more steps than this is not decided (some 60 ms); counted in steps, so that the answer is the same on any machine. */
export const MOST_STEPS = 600_000
/** The whole sheet's limit, for machines that stall. */
export const SHEET_LIMIT_MS = 10_000
