package org.toprung.budget.response;

/**
 * Where an atom is after a pulse that went wrong, as far as that is known.
 *
 * @param kind what sort of error it is, and so what can be done about it afterwards
 * @param place the sublevels or levels it is found in, for people
 */
public record Fate(Kind kind, String place) {

  /** Sort of an error. */
  public enum Kind {
    /** The atom stays in start and target, wrongly turned or out of phase. */
    PHASE("phase"),
    /** The atom sits in other sublevels of the driven ladder; light or microwaves may fetch it. */
    LEAK("leak"),
    /** The atom has left the ladder by emitting or absorbing a photon of its own. */
    LOSS("loss"),
    /** The atom is where it should be and its state is read wrongly. */
    READOUT("readout"),
    /** The same in every shot, so that setting the pulse better takes it away. */
    RECOVERABLE("recoverable");

    private final String word;

    Kind(String word) {
      this.word = word;
    }

    /**
     * The kind in a word, for tables.
     *
     * @return a lower-case word
     */
    public String word() {
      return word;
    }
  }

  /**
   * Checks the parts.
   *
   * @param kind what sort of error it is
   * @param place where the atom is found, for people
   * @throws IllegalArgumentException if a part is missing
   */
  public Fate {
    if (kind == null || place == null || place.isBlank()) {
      throw new IllegalArgumentException(
          "a fate needs a kind and a place, not " + kind + " and " + place);
    }
  }
}
