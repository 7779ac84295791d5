/** The plan prepared once per limit revision, the screener, region results, attribution and the verdict. */
package org.laddergate.screening;
