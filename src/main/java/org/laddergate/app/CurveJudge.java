package org.laddergate.app;

import org.laddergate.limits.LimitSet;
import org.laddergate.measurement.Measurement;
import org.laddergate.screening.Judgement;

/** Judges a measurement without storing anything, for the command line. */
@FunctionalInterface
interface CurveJudge {
    Judgement judge(Measurement measurement, LimitSet limits);
}
