package org.spikewright.ledger;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatThrownBy;

import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.spikewright.reading.Reading;

/** The database is held to a number of pages; past it, it answers as on a full disk. */
class FullDiskTest {
  @TempDir Path folder;

  @Test
  void aFullDiskLosesTheDeliveryWholeAndTheLedgerGoesOnWhenThereIsRoom() throws Exception {
    Path file = folder.resolve("a.db");
    SqliteFile sqlite = new SqliteFile(file);
    Sql sql = sqlite.openToWrite();
    Migrator.run(sql);
    Owner owner = Owner.claim(file).owner().orElseThrow();
    try (Ledger ledger =
        new Ledger(sql, sqlite.openToRead(), owner, Samples.CALENDAR, Samples.PAUSE)) {
      Reading kept = Samples.timed("kept", 0, 1, Samples.MORNING, 0.1);
      Samples.deliver(ledger, "kept.csv", List.of(kept));
      sql.script(List.of("PRAGMA max_page_count = 120"));
      try (Delivery delivery = ledger.receive(Samples.arriving("big.csv", Samples.DAY))) {
        assertThatThrownBy(() -> fill(delivery))
            .isInstanceOf(LedgerFault.class)
            .hasMessageContaining("disk is full")
            .hasMessageContaining("a.db");
        assertThatThrownBy(() -> delivery.commit(Samples.tally(0), "", "done/big.csv"))
            .isInstanceOf(IllegalStateException.class);
      }
      assertThat(ledger.newestArrival()).isEqualTo(1);
      sql.script(List.of("PRAGMA max_page_count = 100000"));
      try (Delivery delivery = ledger.receive(Samples.arriving("big.csv", Samples.DAY))) {
        fill(delivery);
        assertThat(delivery.commit(Samples.tally(40_000), "", "done/big.csv").repeated()).isZero();
      }
      assertThat(ledger.subjects(Samples.DAY, 1)).containsExactly(kept.subject());
      assertThat(ledger.subjects(Samples.DAY, 2)).hasSize(101);
    }
  }

  private static void fill(Delivery delivery) {
    for (int i = 0; i < 40_000; i++) {
      delivery.reading(
          Samples.timed("big" + i % 100, i % 5, i, Samples.MORNING.plusMillis(i), 0.5));
    }
  }
}
