"""One-time codes and link tokens: made from the system's random source, kept as digests only."""

import hashlib
import secrets

# Crockford's base 32: no I, L, O, U, so that a code can be read out over a noisy bench.
SIGNS = "0123456789ABCDEFGHJKMNPQRSTVWXYZ"
LOOKALIKES = str.maketrans({"O": "0", "I": "1", "L": "1", "-": None, " ": None})
CODE_GONE = "This code does not fit, was used, or is too old. Ask for a new one; nobody is locked out."


def new_code() -> str:
    """Return a one-time code of sixteen signs, 80 random bits, in groups of four."""
    signs = "".join(secrets.choice(SIGNS) for _ in range(16))
    return "-".join(signs[at : at + 4] for at in range(0, 16, 4))


def code_digest(code: str) -> str:
    """Return the digest a code is kept as; capitals, dashes, spaces and lookalike signs make no difference."""
    plain = code.strip().upper().translate(LOOKALIKES)
    return hashlib.sha256(f"one-time-code/1\n{plain}".encode()).hexdigest()


def new_token() -> str:
    """Return a link token of 256 random bits."""
    return secrets.token_urlsafe(32)


def token_digest(token: str) -> str:
    """Return the digest a token is kept as."""
    return hashlib.sha256(token.strip().encode()).hexdigest()
