package org.laddergate;
import org.junit.jupiter.api.Test;
class SmokeTest { @Test void t() {} }
