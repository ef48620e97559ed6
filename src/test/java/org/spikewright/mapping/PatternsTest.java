package org.spikewright.mapping;

import static org.assertj.core.api.Assertions.assertThat;
import static org.assertj.core.api.Assertions.assertThatCode;

import java.time.Duration;
import java.util.List;
import java.util.Random;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class PatternsTest {

  @ParameterizedTest(name = "{0} on ''{1}'': {2}")
  @CsvSource({
    "Cal*,Cal 1,true",
    "Cal*,Cal,true",
    "Cal*,cal 1,false",
    "*,'',true",
    "'','',true",
    "'','  ',true",
    "'',x,false",
    "?,a,true",
    "?,'',false",
    "<*,<0.01,true",
    "a*b*c,axxbyyc,true",
    "a*b*c,axxbyy,false",
    "*QC*,my QC 3,true",
    "Rinse,' Rinse ',true",
    "*a,aaab,false"
  })
  void wordsMatchWholeAndCaseCounts(String pattern, String text, boolean matches) {
    assertThat(new Glob(pattern).matches(text)).isEqualTo(matches);
  }

  @ParameterizedTest(name = "{0} on {1}: {2}")
  @CsvSource({
    "furnace/*.csv,furnace/a.csv,true",
    "furnace/*.csv,FURNACE/A.CSV,true",
    "furnace/*.csv,furnace/b/a.csv,false",
    "furnace/**/*.csv,furnace/a.csv,true",
    "furnace/**/*.csv,furnace/b/c/a.csv,true",
    "**/*.csv,a.csv,true",
    "**.csv,x/y/a.csv,true",
    "*.csv,x/a.csv,false",
    "run?.csv,run1.csv,true",
    "run?.csv,run/.csv,false",
    "a/**,a/b/c,true",
    "a/**,a,false",
    "**/b/*.txt,a/xb/c.txt,false",
    "Ä*.csv,ärger.csv,true",
    "*.csv,.csv,true",
    "x/**/y,x/y,true",
    "x/**/y,xy,false"
  })
  void filesMatchByFolderAndCaseDoesNotCount(String pattern, String path, boolean matches) {
    assertThat(new PathPattern(pattern).matches(path)).isEqualTo(matches);
  }

  /** The expected side is a regular expression made from the same pattern. */
  @Test
  void wordsAgreeWithARegularExpressionOnRandomTexts() {
    long seed = 42;
    Random random = new Random(seed);
    int matched = 0;
    for (int i = 0; i < 20_000; i++) {
      String pattern = random(random, "ab*?", 6);
      String text = random(random, "ab", 7);
      String regex = pattern.replace("*", ".*").replace("?", ".");
      boolean expected = Pattern.matches(regex, text);
      matched += expected ? 1 : 0;
      assertThat(new Glob(pattern).matches(text))
          .as("seed %s: %s on %s", seed, pattern, text)
          .isEqualTo(expected);
    }
    assertThat(matched).isGreaterThan(1000);
  }

  private static String random(Random random, String alphabet, int most) {
    StringBuilder text = new StringBuilder();
    for (int length = random.nextInt(most + 1); length > 0; length--) {
      text.append(alphabet.charAt(random.nextInt(alphabet.length())));
    }
    return text.toString();
  }

  @Test
  void hostileNamesTakeLittleTime() {
    String path = "a".repeat(4000) + "b";
    String pattern = "*a".repeat(60) + "*c";
    assertThatCode(
            () ->
                org.junit.jupiter.api.Assertions.assertTimeout(
                    Duration.ofSeconds(5),
                    () -> {
                      assertThat(new PathPattern(pattern).matches(path)).isFalse();
                      assertThat(new Glob(pattern).matches(path)).isFalse();
                    }))
        .doesNotThrowAnyException();
  }

  @Test
  void spellingFindsTheNearestWordAndIsSilentAboutFarOnes() {
    List<String> keys = List.of("separator", "decimal", "header", "sheet");
    assertThat(Spelling.nearest("seperator", keys)).contains("separator");
    assertThat(Spelling.nearest("Header", keys)).contains("header");
    assertThat(Spelling.nearest("hedaer", keys)).contains("header");
    assertThat(Spelling.nearest("colour", keys)).isEmpty();
    assertThat(Spelling.distance("ab", "ba")).isEqualTo(2);
    assertThat(Spelling.distance("", "abc")).isEqualTo(6);
  }
}
