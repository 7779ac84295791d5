/** Main program, commands, configuration and wiring. */
package org.laddergate.app;
