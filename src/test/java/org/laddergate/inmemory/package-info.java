/** Stores and a judge that work in memory, for tests of what stands in front of them. */
package org.laddergate.inmemory;
