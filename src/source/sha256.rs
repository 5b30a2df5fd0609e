//! The hash that ties a record to the very bytes of a source.

use sha2::{Digest, Sha256};

/// The SHA-256 of some bytes as 64 hexadecimal digits.
pub fn sha256_hex(bytes: &[u8]) -> String {
    let digest = Sha256::digest(bytes);
    digest.iter().map(|byte| format!("{byte:02x}")).collect()
}
