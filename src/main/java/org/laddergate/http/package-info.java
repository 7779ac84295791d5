/** Routes, JSON, problem details and the served OpenAPI document. */
package org.laddergate.http;
