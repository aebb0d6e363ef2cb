package org.toprung.budget.app;

/** A file that cannot be written where the user wants it. The message is one line. */
final class BadOutputException extends RuntimeException {
  private static final long serialVersionUID = 1L;

  BadOutputException(String message, Throwable cause) {
    super(message, cause);
  }
}
