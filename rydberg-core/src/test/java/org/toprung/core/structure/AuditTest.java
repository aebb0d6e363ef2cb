package org.toprung.core.structure;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.toprung.core.atom.Catalogue;

class AuditTest {
  private static final List<Audit.Finding> FINDINGS = Audit.of(Catalogue.bundled()).findings();

  // the only difference above 3 sigma: Antypas and Elliott (2013) and Damitz et al. (2019) do not
  // agree on Cs 6S-7P3/2
  @Test
  void theCatalogueHoldsTogetherUpToTheKnownLimit() {
    Set<String> beyond =
        FINDINGS.stream()
            .filter(f -> f.sigmas() > 3)
            .map(f -> f.species() + " " + f.check() + " " + f.subject())
            .collect(Collectors.toSet());
    assertEquals(Set.of("Cs-133 ALTERNATIVE 6S1/2-7P3/2"), beyond);
  }

  @Test
  void everyKindOfCheckIsMadeAndTheWorstStandsFirst() {
    assertEquals(
        EnumSet.allOf(Audit.Check.class),
        FINDINGS.stream().map(Audit.Finding::check).collect(Collectors.toSet()));
    for (int i = 1; i < FINDINGS.size(); i++) {
      assertTrue(FINDINGS.get(i).sigmas() <= FINDINGS.get(i - 1).sigmas());
    }
    for (Audit.Finding finding : FINDINGS) {
      assertTrue(finding.uncertainty() > 0 && finding.relative() < 0.15, finding.toString());
      assertFalse(finding.check().description().isBlank());
    }
    assertEquals(
        Catalogue.bundled().isotopes(),
        FINDINGS.stream().map(Audit.Finding::species).distinct().sorted().toList());
  }

  // validation: measured lifetimes of first resonance lines follow from measured elements to 0.5 %,
  // those of second ones too, with computed elements in the sum, but for Rb 6P3/2 with 3 %
  @Test
  void lifetimesFollowFromElements() {
    List<Audit.Finding> lifetimes =
        FINDINGS.stream().filter(f -> f.check() == Audit.Check.LIFETIME).toList();
    assertEquals(15, lifetimes.size());
    for (Audit.Finding finding : lifetimes) {
      assertTrue(finding.relative() < 0.04, finding.toString());
    }
    assertEquals(14, lifetimes.stream().filter(f -> f.relative() < 0.008).count());
  }

  @Test
  void aWrongValueDisagreesWithTheElementsAndWithTheOldOne(@TempDir Path directory)
      throws IOException {
    Path file = directory.resolve("wrong.csv");
    Files.writeString(
        file,
        "species,quantity,level,value,uncertainty,unit,source,memory,chosen_because\n"
            + "K,lifetime,4P1/2,29.69,0.05,ns,\"A slip of the pen\",no,\n");
    List<Audit.Finding> findings = Audit.of(Catalogue.bundled().with(file)).findings();
    for (int i = 0; i < 2; i++) {
      assertEquals("K-39", findings.get(i).species());
      assertEquals("4P1/2", findings.get(i).subject());
      assertTrue(findings.get(i).sigmas() > 10);
    }
    assertTrue(findings.stream().limit(2).anyMatch(f -> f.origin().endsWith("wrong.csv:2")));
  }
}
