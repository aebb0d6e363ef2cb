package org.toprung.core.radial;

import java.math.BigDecimal;
import java.math.BigInteger;
import java.math.MathContext;

/**
 * Hydrogen radial integrals by integrating the polynomials term by term (the sums that Gordon, Ann.
 * Phys. (Leipzig) 394, 1031 (1929) brings into closed form). The terms alternate and cancel about
 * n/2 digits each side, so 260 digits leave far more than a double up to n = 150.
 */
final class ExactHydrogen {
  private static final MathContext DIGITS = new MathContext(260);

  private ExactHydrogen() {}

  /** ∫ P_nl r^k P_n′l′ dr, waves positive near r = 0. */
  static double power(int n, int l, int n2, int l2, int k) {
    BigDecimal[] a = coefficients(n, l);
    BigDecimal[] b = coefficients(n2, l2);
    // ∫ r^p e^(-r(1/n+1/n2)) dr = p! (n n2/(n+n2))^(p+1)
    BigDecimal scale = BigDecimal.valueOf((long) n * n2).divide(BigDecimal.valueOf(n + n2), DIGITS);
    BigDecimal sum = BigDecimal.ZERO;
    for (int i = 0; i < a.length; i++) {
      for (int j = 0; j < b.length; j++) {
        int p = l + 1 + i + l2 + 1 + j + k;
        sum =
            sum.add(
                a[i].multiply(b[j], DIGITS)
                    .multiply(new BigDecimal(factorial(p)), DIGITS)
                    .multiply(scale.pow(p + 1, DIGITS), DIGITS));
      }
    }
    BigDecimal norm = norm(n, l).multiply(norm(n2, l2), DIGITS).sqrt(DIGITS);
    return sum.divide(norm, DIGITS).doubleValue();
  }

  /** Coefficients of r^(l+1+i) in r^(l+1) L_{n-l-1}^{2l+1}(2r/n). */
  private static BigDecimal[] coefficients(int n, int l) {
    int degree = n - l - 1;
    BigDecimal[] c = new BigDecimal[degree + 1];
    BigDecimal x = BigDecimal.valueOf(2).divide(BigDecimal.valueOf(n), DIGITS);
    for (int i = 0; i <= degree; i++) {
      BigInteger binomial =
          factorial(n + l).divide(factorial(degree - i).multiply(factorial(2 * l + 1 + i)));
      BigDecimal value =
          new BigDecimal(binomial)
              .multiply(x.pow(i, DIGITS), DIGITS)
              .divide(new BigDecimal(factorial(i)), DIGITS);
      c[i] = i % 2 == 0 ? value : value.negate();
    }
    return c;
  }

  /** ∫ of the square: (n/2)^(2l+3) 2n (n+l)!/(n-l-1)!. */
  private static BigDecimal norm(int n, int l) {
    return BigDecimal.valueOf(n)
        .divide(BigDecimal.valueOf(2), DIGITS)
        .pow(2 * l + 3, DIGITS)
        .multiply(BigDecimal.valueOf(2L * n), DIGITS)
        .multiply(new BigDecimal(factorial(n + l).divide(factorial(n - l - 1))), DIGITS);
  }

  private static BigInteger factorial(int n) {
    BigInteger product = BigInteger.ONE;
    for (int i = 2; i <= n; i++) {
      product = product.multiply(BigInteger.valueOf(i));
    }
    return product;
  }
}
