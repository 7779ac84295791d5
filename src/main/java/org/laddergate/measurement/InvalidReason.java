package org.laddergate.measurement;

import java.util.Locale;

/**
 * Why a measurement is not to be believed. Each constant says what happened and what the operator should do; the code
 * on the wire is the constant's name in lower case and never changes.
 */
public enum InvalidReason {
    /** Too many bins of the recipe's window hold no sample. Check the sampling rate and the transfer. */
    TOO_FEW_SAMPLES,
    /** The record ends well before the recipe's window does. Check the recording length; measure again. */
    RECORD_TOO_SHORT,
    /** The first sample comes well after the cut time. Check the trigger and the sampling rate. */
    RECORD_STARTS_LATE,
    /** The signal jumps, floats or stands still as a broken sensor line does. Check the contacts. */
    SENSOR_OPEN_OR_SHORT,
    /** The temperature hardly changes. Check that the part was heated. */
    NO_HEATING,
    /** The temperature moves the wrong way. Check polarity, K factor sign and the curve kind. */
    REVERSED_POLARITY,
    /** The signal stands still where it must move: the converter is at its limit. Check the measuring range. */
    SATURATED,
    /** The noise is far above that of the golden units. Check contacts, shielding and sensing current. */
    NOISE_TOO_HIGH,
    /** Single samples are far off their neighbours. Check contacts and interference; measure again. */
    SPIKES,
    /** The reported heating power is off the recipe's by more than the recipe allows. */
    POWER_OFF_NOMINAL,
    /** The reported heating time is off the recipe's by more than can be corrected. */
    PULSE_LENGTH_OFF_NOMINAL,
    /** The curve looks like that of another power than reported, or the K factor is wrong. */
    POWER_INCONSISTENT,
    /** The curve looks as if recording had started after time zero. Check the trigger. */
    LATE_TRIGGER,
    /** The time axis looks stretched. Check the sampling clock. */
    TIMEBASE_INCONSISTENT,
    /** The curve looks like that of another heating time than reported. */
    PULSE_LENGTH_INCONSISTENT,
    /** The heat sink drifts, or the part was not in equilibrium before the pulse. Let it settle; measure again. */
    BASE_DRIFT,
    /** The curve is that of another product. Check which part is clamped. */
    UNLIKE_PRODUCT,
    /** A region of the tester has shifted. Clean and check the fixture; measure again. */
    FIXTURE_SHIFT;

    /** Stable code on the wire and in files. */
    public String code() {
        return name().toLowerCase(Locale.ROOT);
    }

    /** The constant of a code. */
    public static InvalidReason ofCode(String code) {
        return valueOf(code.toUpperCase(Locale.ROOT));
    }
}
