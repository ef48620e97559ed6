package org.spikewright.app;

import java.nio.ByteBuffer;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import org.spikewright.reading.Recorded;
import org.spikewright.series.AdditionSeries;
import org.spikewright.series.Flask;
import org.spikewright.series.Gathered;
import org.spikewright.series.Ungrouped;
import org.spikewright.table.Position;

/**
 * Names everything a result was computed from. A recorded reading never changes, so that its
 * delivery and cell name it.
 */
final class InputsHash {
  private InputsHash() {}

  /**
   * SHA-256 in hexadecimal.
   *
   * @param settingsSha256 of the settings that held
   */
  static String of(Gathered gathered, String settingsSha256) {
    MessageDigest digest = sha256();
    digest.update(settingsSha256.getBytes(StandardCharsets.UTF_8));
    if (gathered instanceof AdditionSeries series) {
      for (Flask flask : series.flasks()) {
        add(digest, flask.readings());
        add(digest, flask.secondRun());
      }
    } else {
      add(digest, ((Ungrouped) gathered).readings());
    }
    return HexFormat.of().formatHex(digest.digest());
  }

  private static void add(MessageDigest digest, List<Recorded> readings) {
    ByteBuffer numbers = ByteBuffer.allocate(2 * Long.BYTES + Integer.BYTES);
    for (Recorded recorded : readings) {
      Position position = recorded.reading().position();
      numbers.putLong(0, recorded.arrival());
      numbers.putLong(Long.BYTES, position.row());
      numbers.putInt(2 * Long.BYTES, position.column());
      digest.update(numbers.array());
      if (position.source().sheet().isPresent()) {
        digest.update(position.source().sheet().get().getBytes(StandardCharsets.UTF_8));
      }
    }
  }

  private static MessageDigest sha256() {
    try {
      return MessageDigest.getInstance("SHA-256");
    } catch (NoSuchAlgorithmException everyPlatformHasIt) {
      throw new IllegalStateException(everyPlatformHasIt);
    }
  }
}
