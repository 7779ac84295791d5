/** Product, regions, decision rule, limit set, and their files and revisions. */
package org.laddergate.limits;
