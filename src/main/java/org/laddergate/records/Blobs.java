package org.laddergate.records;

import java.nio.ByteBuffer;
import java.nio.ByteOrder;

/** Arrays as little-endian bytes; every bit survives, NaN payloads included. */
final class Blobs {
    private Blobs() {}

    static byte[] of(double[] values) {
        ByteBuffer b = ByteBuffer.allocate(8 * values.length).order(ByteOrder.LITTLE_ENDIAN);
        b.asDoubleBuffer().put(values);
        return b.array();
    }

    static byte[] of(int[] values) {
        ByteBuffer b = ByteBuffer.allocate(4 * values.length).order(ByteOrder.LITTLE_ENDIAN);
        b.asIntBuffer().put(values);
        return b.array();
    }

    static double[] doubles(byte[] bytes) {
        double[] out = new double[bytes.length / 8];
        ByteBuffer.wrap(bytes).order(ByteOrder.LITTLE_ENDIAN).asDoubleBuffer().get(out);
        return out;
    }

    static int[] ints(byte[] bytes) {
        int[] out = new int[bytes.length / 4];
        ByteBuffer.wrap(bytes).order(ByteOrder.LITTLE_ENDIAN).asIntBuffer().get(out);
        return out;
    }
}
