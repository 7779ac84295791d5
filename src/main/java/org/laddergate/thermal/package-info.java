/** Log-time grid, time constant spectrum, Foster network, Cauer ladder, structure function, responses. */
package org.laddergate.thermal;
