//! Gauss–Jordan elimination in whole numbers: nothing is rounded, and each row is divided by what
//! its entries share.

use num_bigint::BigInt;
use num_integer::Integer;
use num_traits::Zero;

/// Clears all but one row in each of the first columns, where it can; the rows that remain have one
/// pivot each. Returns the pivot columns.
pub(crate) fn eliminate(rows: &mut Vec<Vec<BigInt>>, columns: usize) -> Vec<usize> {
    let mut pivots = Vec::new();
    for column in 0..columns {
        let rank = pivots.len();
        let Some(at) = (rank..rows.len()).find(|row| !rows[*row][column].is_zero()) else {
            continue;
        };
        // The order of those below stays, so that the next pivot is again the first that serves.
        rows[rank..=at].rotate_right(1);
        let pivot = rows[rank].clone();
        for (index, row) in rows.iter_mut().enumerate() {
            if index != rank {
                clear(row, &pivot, column);
            }
        }
        pivots.push(column);
    }
    rows.truncate(pivots.len());
    pivots
}

/// Takes multiples of the pivot row from a row until it has zero in the column.
fn clear(row: &mut [BigInt], pivot: &[BigInt], column: usize) {
    if row[column].is_zero() {
        return;
    }
    let (own, other) = (row[column].clone(), &pivot[column]);
    for (entry, taken) in row.iter_mut().zip(pivot) {
        *entry = &*entry * other - taken * &own;
    }
    let shared = row.iter().fold(BigInt::zero(), |gcd, entry| gcd.gcd(entry));
    if !shared.is_zero() {
        row.iter_mut().for_each(|entry| *entry /= &shared);
    }
}
