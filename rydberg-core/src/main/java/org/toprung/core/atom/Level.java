package org.toprung.core.atom;

import java.util.Comparator;

/**
 * A fine-structure level n l j of the valence electron, written like "6P3/2". Immutable.
 *
 * <p>Orbital letters are S P D F G H I K L M N O Q R T U V W X Y Z for l = 0 to 20; from there on
 * the number stands in brackets, as in "60[25]51/2".
 */
public final class Level implements Comparable<Level> {
  /** Largest principal quantum number allowed. */
  public static final int MAXIMUM_N = 150;

  private static final String LETTERS = "SPDFGHIKLMNOQRTUVWXYZ";
  private static final int MOST_DIGITS = 9;
  private static final Comparator<Level> ORDER =
      Comparator.comparingInt(Level::n)
          .thenComparingInt(Level::l)
          .thenComparingInt(Level::doubledJ);

  private final int n;
  private final int l;
  private final int doubledJ;

  private Level(int n, int l, int doubledJ) {
    this.n = n;
    this.l = l;
    this.doubledJ = doubledJ;
  }

  /**
   * The level with the given quantum numbers.
   *
   * @param n principal quantum number, 1 to {@value #MAXIMUM_N}
   * @param l orbital quantum number, 0 to n − 1
   * @param doubledJ twice the total electronic angular momentum: 2l + 1, or 2l − 1 where l &gt; 0
   * @return the level
   * @throws IllegalArgumentException if a quantum number is out of its range
   */
  public static Level of(int n, int l, int doubledJ) {
    requirePossible(n, l, doubledJ, null);
    return new Level(n, l, doubledJ);
  }

  /**
   * Reads a level.
   *
   * @param text n, the capital letter of l, j, for example "6P3/2"
   * @return the level
   * @throws IllegalArgumentException if the text has another form or names no possible level
   */
  public static Level parse(String text) {
    // by hand: levels are read by the hundred when a catalogue is, and a regex is slow to start
    int letter = digitsEnd(text, 0);
    boolean bracket = letter < text.length() && text.charAt(letter) == '[';
    int bracketEnd = bracket ? digitsEnd(text, letter + 1) : letter;
    int j = bracketEnd + 1;
    int slash = j <= text.length() ? digitsEnd(text, j) : -1;
    boolean understood =
        isNumber(0, letter)
            && letter < text.length()
            && (bracket
                ? isNumber(letter + 1, bracketEnd) && text.startsWith("]", bracketEnd)
                : text.charAt(letter) >= 'A' && text.charAt(letter) <= 'Z')
            && isNumber(j, slash)
            && text.substring(slash).equals("/2");
    if (!understood) {
      throw Refusal.of(
          "level \"%s\" is not understood; write n, the letter of l and j, for example 6P3/2",
          text);
    }
    int l =
        bracket
            ? Integer.parseInt(text.substring(letter + 1, bracketEnd))
            : LETTERS.indexOf(text.charAt(letter));
    if (l < 0) {
      throw Refusal.of(
          "level \"%s\": \"%s\" stands for no l; the letters are %s",
          text, text.charAt(letter), LETTERS);
    }
    int n = Integer.parseInt(text.substring(0, letter));
    int doubledJ = Integer.parseInt(text.substring(j, slash));
    requirePossible(n, l, doubledJ, text);
    return new Level(n, l, doubledJ);
  }

  /** Where the ASCII digits that begin at an index end. */
  private static int digitsEnd(String text, int from) {
    int i = from;
    while (i < text.length() && text.charAt(i) >= '0' && text.charAt(i) <= '9') {
      i++;
    }
    return i;
  }

  /** Whether that many digits are a number that fits. */
  private static boolean isNumber(int from, int end) {
    return end > from && end - from <= MOST_DIGITS;
  }

  /**
   * The text is what was given, null where it was numbers: this is called often and seldom refuses.
   */
  private static void requirePossible(int n, int l, int doubledJ, String text) {
    if (!(n >= 1 && n <= MAXIMUM_N)) {
      throw impossible(n, l, doubledJ, text, "n must be 1 to " + MAXIMUM_N + ", given " + n);
    }
    if (!(l >= 0 && l < n)) {
      throw impossible(n, l, doubledJ, text, "l must be 0 to n-1=" + (n - 1) + ", given " + l);
    }
    if (doubledJ != 2 * l + 1 && (l == 0 || doubledJ != 2 * l - 1)) {
      String allowed = l == 0 ? "1/2" : (2 * l - 1) + "/2 or " + (2 * l + 1) + "/2";
      throw impossible(
          n, l, doubledJ, text, "j must be " + allowed + ", given " + Halves.text(doubledJ));
    }
  }

  private static IllegalArgumentException impossible(
      int n, int l, int doubledJ, String text, String rule) {
    String given = text != null ? text : "n=" + n + " l=" + l + " 2j=" + doubledJ;
    return Refusal.of("level \"%s\": %s", given, rule);
  }

  /**
   * The principal quantum number.
   *
   * @return n, 1 to {@value #MAXIMUM_N}
   */
  public int n() {
    return n;
  }

  /**
   * The orbital quantum number.
   *
   * @return l, 0 to n − 1
   */
  public int l() {
    return l;
  }

  /**
   * Twice the total electronic angular momentum.
   *
   * @return 2j, an odd number
   */
  public int doubledJ() {
    return doubledJ;
  }

  /**
   * The name of the series the level belongs to.
   *
   * @return the level without n, for example "P3/2"
   */
  public String series() {
    return letter(l) + doubledJ + "/2";
  }

  /** The letter of an orbital quantum number, or the number in brackets. */
  static String letter(int l) {
    return l < LETTERS.length() ? LETTERS.substring(l, l + 1) : "[" + l + "]";
  }

  /** Orders by n, then l, then j. */
  @Override
  public int compareTo(Level other) {
    return ORDER.compare(this, other);
  }

  /** {@inheritDoc} */
  @Override
  public boolean equals(Object other) {
    return other instanceof Level that && that.n == n && that.l == l && that.doubledJ == doubledJ;
  }

  /** {@inheritDoc} */
  @Override
  public int hashCode() {
    return (n * (MAXIMUM_N + 1) + l) * 2 + (doubledJ > 2 * l ? 1 : 0);
  }

  /**
   * The level in the form {@link #parse} reads.
   *
   * @return for example "6P3/2"
   */
  @Override
  public String toString() {
    return n + series();
  }
}
