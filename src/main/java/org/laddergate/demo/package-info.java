/** Invented products: a conduction model with known faults and a simulated line. Nothing here was measured. */
package org.laddergate.demo;
