package org.toprung.core.atom;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotSame;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class CatalogueTest {
  private static final String HEADER =
      "species,quantity,level,value,uncertainty,unit,source,memory,chosen_because";

  private static Catalogue with(String... rows) {
    String[] lines = new String[rows.length + 1];
    lines[0] = HEADER;
    System.arraycopy(rows, 0, lines, 1, rows.length);
    return Catalogue.bundled().with("own.csv", Arrays.asList(lines));
  }

  @Test
  void everyPromisedIsotopeIsThere() {
    assertEquals(
        List.of("Cs-133", "H", "K-39", "K-40", "K-41", "Li-6", "Li-7", "Na-23", "Rb-85", "Rb-87"),
        Catalogue.bundled().isotopes());
    assertEquals(Set.of(), Catalogue.bundled().unusedSources());
  }

  @ParameterizedTest
  @ValueSource(
      strings = {"H", "Li-6", "Li-7", "Na-23", "K-39", "K-40", "K-41", "Rb-85", "Rb-87", "Cs-133"})
  void everyIsotopeHasItsSeriesHyperfineConstantsAndLevelsToTheLargestN(String name) {
    Species species = Species.parse(name);
    int ground = species.groundLevel().n();
    for (String p : new String[] {"P1/2", "P3/2"}) {
      int first = Math.max(ground, 2);
      assertTrue(species.hyperfine(Level.parse(first + p)).measured());
      assertTrue(species.hyperfine(Level.parse(first + 1 + p)).aHertz() != 0);
    }
    assertTrue(species.hyperfine(species.groundLevel()).measured());
    for (int l = 0; l < 12; l++) {
      for (int j = Math.max(1, 2 * l - 1); j <= 2 * l + 1; j += 2) {
        double previous = Double.NEGATIVE_INFINITY;
        for (int n = l + 1; n <= Level.MAXIMUM_N; n++) {
          Level level = Level.of(n, l, j);
          if (species.isValid(level)) {
            double energy = species.energyHertz(level).value();
            assertTrue(energy > previous && energy < 0, level.toString());
            previous = energy;
          }
        }
      }
    }
  }

  @Test
  void rowsOfTheUserGoFirstAndBothStayVisible() {
    Species own =
        with("Rb,lifetime,6P3/2,120.0,0.5,ns,Own measurement of today,no,").species("Rb-87");
    Datum best = own.datum(Datum.Kind.LIFETIME, "6P3/2").orElseThrow();
    assertEquals(120.0, best.value());
    assertEquals("own.csv:2", best.origin());
    assertEquals("Own measurement of today", best.source());
    assertTrue(
        own.data().stream()
            .anyMatch(d -> d.origin().startsWith("rubidium.csv:") && d.value() == 118));
    assertEquals(
        118, Species.RUBIDIUM_87.datum(Datum.Kind.LIFETIME, "6P3/2").orElseThrow().value());
    assertNotSame(Species.RUBIDIUM_87, own);
  }

  // a pair in the other order, or a level written otherwise, is the same quantity
  @Test
  void rowsOfTheUserGoFirstHoweverTheLevelIsWritten() {
    Species own =
        with(
                "Rb,reduced_dipole,6P3/2-5S1/2,0.53,0.01,a0,Own measurement,no,",
                "Rb,lifetime,6[1]3/2,121,1,ns,Own measurement,no,")
            .species("Rb-87");
    assertEquals(0.53, own.datum(Datum.Kind.REDUCED_DIPOLE, "5S1/2-6P3/2").orElseThrow().value());
    assertEquals(121, own.datum(Datum.Kind.LIFETIME, "6P3/2").orElseThrow().value());
    assertThrows(
        IllegalArgumentException.class,
        () ->
            with(
                "Rb,reduced_dipole,6P3/2-5S1/2,0.53,0.01,a0,Own measurement,no,",
                "Rb,reduced_dipole,5S1/2-6P3/2,0.53,0.01,a0,Own measurement,no,"));
  }

  @ParameterizedTest
  @ValueSource(strings = {"Rb-78", "Rb87", "rb-87", "Xx"})
  void rowsOfAnUnknownSpeciesAreRefused(String name) {
    var e =
        assertThrows(
            IllegalArgumentException.class,
            () -> with(name + ",lifetime,6P3/2,120,1,ns,Own measurement,no,"));
    assertTrue(e.getMessage().startsWith("own.csv:2: "), e.getMessage());
    assertTrue(e.getMessage().contains("Rb-87"), e.getMessage());
  }

  // rows of the element must not make an isotope of what has no mass of its own
  @ParameterizedTest
  @ValueSource(strings = {"H-2", "H-1", "Rb-86", "Rb", ""})
  void namesWithoutAMassOfTheirOwnAreNoIsotopes(String name) {
    assertThrows(IllegalArgumentException.class, () -> Species.parse(name));
  }

  @Test
  void newIsotopesNeedRowsOnly() {
    Species own =
        with(
                "Rb-84,mass,,83.914385,0.000003,u,ame2016,yes,",
                "Rb-84,nuclear_spin,,2,0,1,arimondo1977,yes,",
                "Rb-84,nuclear_g,,0.00018,0.00001,1,arimondo1977,yes,")
            .species("Rb-84");
    assertEquals(4, own.doubledNuclearSpin());
    // the lighter isotope has the smaller reduced mass and lies less deep
    double deeper =
        Species.RUBIDIUM_87.energyHertz(Level.parse("5S1/2")).value()
            - own.energyHertz(Level.parse("5S1/2")).value();
    assertTrue(deeper < -50e6 && deeper > -500e6, "" + deeper);
  }

  @Test
  void aSeriesIsTakenWholeFromOneFit() {
    Species own = with("Rb,quantum_defect_0,S1/2,3.13,0.01,1,A coarse fit,no,").species("Rb-87");
    List<Datum> terms = own.quantumDefects(Level.parse("50S1/2"));
    assertEquals(1, terms.size());
    assertEquals(3.13, terms.get(0).value());
    assertEquals(2, Species.RUBIDIUM_87.quantumDefects(Level.parse("50S1/2")).size());
  }

  @Test
  void ofConflictingValuesTheChosenOneSaysWhy() {
    Datum a = Species.RUBIDIUM_87.datum(Datum.Kind.HYPERFINE_A, "5P1/2").orElseThrow();
    assertEquals(408.328, a.value());
    assertTrue(a.chosenBecause().contains("comb"), a.chosenBecause());
    assertTrue(
        Species.RUBIDIUM_87.data().stream()
            .anyMatch(d -> d.kind() == Datum.Kind.HYPERFINE_A && d.value() == 407.25));
  }

  @Test
  void filesAreReadFromDisk(@TempDir Path directory) throws IOException {
    Path file = directory.resolve("values.csv");
    Files.writeString(
        file, "# mine\n" + HEADER + "\nK,lifetime,4P1/2,26.7,0.1,ns,\"A, B (2024)\",no,\n");
    Catalogue catalogue = Catalogue.bundled().with(file);
    Datum own = catalogue.species("K-39").datum(Datum.Kind.LIFETIME, "4P1/2").orElseThrow();
    assertEquals(26.7, own.value());
    assertEquals(file + ":3", own.origin());
    assertSame(catalogue.species("K-39"), catalogue.species("K-39"));
    assertThrows(
        UncheckedIOException.class,
        () -> Catalogue.bundled().with(directory.resolve("missing.csv")));
  }

  @ParameterizedTest
  @CsvSource(
      delimiter = ';',
      quoteCharacter = '~',
      value = {
        "X-1,mass,,1,0,u,ame2016,yes;9 columns",
        "X-1,mass,,1,0,u,unknown,yes,;source \"unknown\"",
        "X-1,mass,,1,0,u,,yes,;source \"\"",
        "X-1,mass,,1,0,furlong,ame2016,yes,;unit \"furlong\"",
        "X-1,mass,,1,0,MHz,ame2016,yes,;allowed: u",
        "X-1,mass,,1,-1,u,ame2016,yes,;uncertainty",
        "X-1,mass,,NaN,0,u,ame2016,yes,;finite",
        "X-1,mass,,-2,0,u,ame2016,yes,;positive",
        "X-1,mass,,one,0,u,ame2016,yes,;\"one\"",
        "X-1,mass,,1,0,u,ame2016,maybe,;yes or no",
        "X-1,mass,5P1/2,1,0,u,ame2016,yes,;must be nothing",
        "X-1,weight,,1,0,u,ame2016,yes,;quantity \"weight\"",
        "X-1,lifetime,5P,1,0,ns,ame2016,yes,;level \"5P\"",
        "X-1,lifetime,5P5/2,1,0,ns,ame2016,yes,;5P5/2",
        "X-1,reduced_dipole,5P1/2,1,0,a0,ame2016,yes,;two levels",
        "X-1,mass,,1,0,u,\"ame2016,yes,;not closed"
      })
  void rowsThatAreNotUnderstoodAreRefusedWithTheirLine(String row, String part) {
    var e = assertThrows(IllegalArgumentException.class, () -> with("# comment", row));
    assertTrue(e.getMessage().startsWith("own.csv:3: "), e.getMessage());
    assertTrue(e.getMessage().contains(part), e.getMessage());
  }

  @Test
  void duplicatesAndUnexplainedChoicesAreRefused() {
    String row = "X-1,mass,,1,0,u,ame2016,yes,";
    var twice = assertThrows(IllegalArgumentException.class, () -> with(row, row));
    assertTrue(twice.getMessage().startsWith("own.csv:3: "), twice.getMessage());
    var unexplained =
        assertThrows(
            IllegalArgumentException.class, () -> with(row, "X-1,mass,,2,0,u,arimondo1977,yes,"));
    assertTrue(unexplained.getMessage().startsWith("own.csv:3: "), unexplained.getMessage());
    assertTrue(unexplained.getMessage().contains("why it is chosen"), unexplained.getMessage());
    assertThrows(
        IllegalArgumentException.class, () -> with("X-1,mass,,1,0,u,ame2016,yes,no rival"));
  }

  @Test
  void filesWithoutTheirHeaderAreRefused() {
    var headless =
        assertThrows(
            IllegalArgumentException.class,
            () -> Catalogue.bundled().with("own.csv", List.of("species")));
    assertTrue(headless.getMessage().contains("header must be"), headless.getMessage());
    assertThrows(
        IllegalArgumentException.class, () -> Catalogue.bundled().with("own.csv", List.of()));
    var twice =
        assertThrows(
            IllegalArgumentException.class,
            () ->
                Catalogue.citations(
                    "bibliography.csv", List.of("key,citation", "a,A (1999)", "a,B (2000)")));
    assertTrue(twice.getMessage().startsWith("bibliography.csv:3: "), twice.getMessage());
  }
}
