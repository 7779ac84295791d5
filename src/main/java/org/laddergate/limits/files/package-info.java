/** Products and limit sets as text files that people can read, compare and review. */
package org.laddergate.limits.files;
