/** How strongly a deviation from golden speaks for each explanation: the family itself, faults, measurement errors. */
package org.laddergate.limits.evidence;
