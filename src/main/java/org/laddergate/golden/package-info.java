/** Learning from a golden population: outlier tests, tolerance intervals, envelope, fault signatures. */
package org.laddergate.golden;
