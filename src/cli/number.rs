//! Numbers of the command line, with an error that says what would be right.

/// A whole number, also written as `1e6` or `1_000_000`.
pub fn whole(text: &str) -> Result<u64, String> {
    let plain = text.trim().replace('_', "");
    if let Ok(number) = plain.parse() {
        return Ok(number);
    }
    // Beyond 2^53 a float no longer holds every whole number.
    match plain.parse::<f64>() {
        Ok(number) if number.fract() == 0.0 && (0.0..9.0e15).contains(&number) => Ok(number as u64),
        Ok(number) if number < 0.0 => Err("it is below zero: write a whole number such as 4".to_owned()),
        _ => Err("write a whole number, such as 4 or 1e6".to_owned()),
    }
}

/// Per cent, with or without the sign.
pub fn per_cent(text: &str) -> Result<f64, String> {
    let number = text.trim().trim_end_matches('%').trim_end();
    number.parse().map_err(|_| "write per cent as a number, such as 2.5".to_owned())
}

/// A plain number.
pub fn plain(text: &str) -> Result<f64, String> {
    text.trim().parse().map_err(|_| "write a number with a decimal point, such as 1.5".to_owned())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn whole_numbers_are_read_as_they_are_written() {
        for (text, number) in
            [("7", 7), ("1e6", 1_000_000), ("1_000", 1000), ("18446744073709551615", u64::MAX)]
        {
            assert_eq!(whole(text), Ok(number));
        }
        for text in ["", "x", "1.5", "-3", "nan", "1e30", "1,000"] {
            assert!(whole(text).is_err(), "{text}");
        }
        assert_eq!((per_cent("5 %"), per_cent("2.5")), (Ok(5.0), Ok(2.5)));
        assert!(per_cent("five").is_err() && plain("1,5").is_err());
    }
}
