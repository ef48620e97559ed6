package org.spikewright.offence;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.File;
import java.io.FileReader;
import java.io.FileWriter;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.OutputStreamWriter;
import java.io.PrintStream;
import java.io.PrintWriter;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;
import java.text.Collator;
import java.text.DecimalFormat;
import java.text.NumberFormat;
import java.text.SimpleDateFormat;
import java.time.Clock;
import java.time.Instant;
import java.time.LocalDate;
import java.time.LocalDateTime;
import java.time.LocalTime;
import java.time.OffsetDateTime;
import java.time.ZoneId;
import java.time.ZoneOffset;
import java.time.ZonedDateTime;
import java.time.format.DateTimeFormatter;
import java.time.format.DateTimeFormatterBuilder;
import java.util.Calendar;
import java.util.Collections;
import java.util.Date;
import java.util.Formatter;
import java.util.List;
import java.util.Locale;
import java.util.Scanner;
import java.util.TimeZone;
import java.util.UUID;
import java.util.function.UnaryOperator;

/** One of each call that is banned outside the wiring. */
public final class DefaultsOffence {
  private DefaultsOffence() {}

  static List<Object> time() {
    ZoneId zone = ZoneId.systemDefault();
    return List.of(
        System.currentTimeMillis(),
        Instant.now(),
        Clock.systemUTC(),
        Clock.systemDefaultZone(),
        Clock.system(zone),
        TimeZone.getDefault(),
        new Date(),
        Calendar.getInstance());
  }

  static List<Object> now(ZoneId zone) {
    return List.of(
        LocalDate.now(),
        LocalDate.now(zone),
        LocalTime.now(),
        LocalTime.now(zone),
        LocalDateTime.now(),
        LocalDateTime.now(zone),
        ZonedDateTime.now(),
        ZonedDateTime.now(zone),
        OffsetDateTime.now(),
        OffsetDateTime.now(zone));
  }

  static List<Object> locale(String text, PrintStream stream, PrintWriter writer) {
    return List.of(
        Locale.getDefault(),
        String.format(text, 1),
        text.formatted(1),
        text.toLowerCase(),
        text.toUpperCase(),
        stream.printf(text, 1),
        writer.printf(text, 1),
        new Formatter(),
        DateTimeFormatter.ofPattern(text),
        new DateTimeFormatterBuilder().toFormatter(),
        new DecimalFormat(text),
        new SimpleDateFormat(text),
        NumberFormat.getInstance(),
        Collator.getInstance());
  }

  static UnaryOperator<String> handedOn() {
    return String::toUpperCase;
  }

  static List<Object> charset(String text, byte[] bytes, File file) throws IOException {
    ByteArrayOutputStream out = new ByteArrayOutputStream();
    ByteArrayInputStream in = new ByteArrayInputStream(bytes);
    return List.of(
        text.getBytes(),
        new String(bytes),
        new String(bytes, 0, 1),
        new FileReader(text),
        new FileReader(file),
        new FileWriter(text),
        new FileWriter(file),
        new InputStreamReader(in),
        new OutputStreamWriter(out),
        new PrintStream(out),
        new PrintWriter(out),
        out.toString(),
        new Scanner(in),
        Charset.defaultCharset());
  }

  static List<Object> chance(List<String> values) {
    Collections.shuffle(values);
    return List.of(
        Math.random(),
        UUID.randomUUID(),
        System.nanoTime(),
        System.getenv("HOME"),
        System.getProperty("user.name"));
  }

  static List<Object> allowed(String text, byte[] bytes, Clock clock) {
    return List.of(
        Instant.now(clock),
        LocalDate.now(clock.withZone(ZoneOffset.UTC)),
        String.format(Locale.ROOT, text, 1),
        text.toLowerCase(Locale.ROOT),
        text.getBytes(StandardCharsets.UTF_8),
        new String(bytes, StandardCharsets.UTF_8),
        DateTimeFormatter.ofPattern(text, Locale.ROOT),
        new InputStreamReader(new ByteArrayInputStream(bytes), StandardCharsets.UTF_8));
  }
}
