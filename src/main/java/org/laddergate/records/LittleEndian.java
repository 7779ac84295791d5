package org.laddergate.records;

import java.nio.ByteBuffer;
import java.nio.ByteOrder;

/** Arrays as BLOBs, bit for bit: NaN payloads and the sign of zero survive. */
final class LittleEndian {
    private LittleEndian() {}

    static byte[] bytes(double[] values) {
        ByteBuffer buffer = ByteBuffer.allocate(values.length * Double.BYTES).order(ByteOrder.LITTLE_ENDIAN);
        buffer.asDoubleBuffer().put(values);
        return buffer.array();
    }

    static byte[] bytes(int[] values) {
        ByteBuffer buffer = ByteBuffer.allocate(values.length * Integer.BYTES).order(ByteOrder.LITTLE_ENDIAN);
        buffer.asIntBuffer().put(values);
        return buffer.array();
    }

    static double[] doubles(byte[] bytes) {
        double[] values = new double[bytes.length / Double.BYTES];
        ByteBuffer.wrap(bytes).order(ByteOrder.LITTLE_ENDIAN).asDoubleBuffer().get(values);
        return values;
    }

    static int[] ints(byte[] bytes) {
        int[] values = new int[bytes.length / Integer.BYTES];
        ByteBuffer.wrap(bytes).order(ByteOrder.LITTLE_ENDIAN).asIntBuffer().get(values);
        return values;
    }
}
