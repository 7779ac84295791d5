/** The curve as received, its recipe and sensor, log-time binning, noise, and the checks that make it believable. */
package org.laddergate.measurement;
