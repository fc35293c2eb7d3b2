//! For tests: the value of a formula as text, so that what a step prints is what it computes.

/// Why a text is no formula.
pub(super) type Trouble = String;

struct Reader<'a> {
    rest: &'a [u8],
    value: &'a dyn Fn(&str) -> Option<f64>,
}

/// The value of `formula` (numbers, `+ - * / ^`, brackets, `pi`, a few functions) with the values
/// of its symbols.
pub(super) fn evaluate(formula: &str, value: &dyn Fn(&str) -> Option<f64>) -> Result<f64, Trouble> {
    let mut reader = Reader {
        rest: formula.as_bytes(),
        value,
    };
    let result = reader.sum()?;
    reader.blanks();
    if reader.rest.is_empty() {
        Ok(result)
    } else {
        Err(format!("left over in {formula}"))
    }
}

impl Reader<'_> {
    fn blanks(&mut self) {
        while self.rest.first() == Some(&b' ') {
            self.rest = &self.rest[1..];
        }
    }

    fn take(&mut self, wanted: u8) -> bool {
        self.blanks();
        if self.rest.first() == Some(&wanted) {
            self.rest = &self.rest[1..];
            return true;
        }
        false
    }

    fn sum(&mut self) -> Result<f64, Trouble> {
        let mut total = self.product()?;
        loop {
            if self.take(b'+') {
                total += self.product()?;
            } else if self.take(b'-') {
                total -= self.product()?;
            } else {
                return Ok(total);
            }
        }
    }

    fn product(&mut self) -> Result<f64, Trouble> {
        let mut total = self.power()?;
        loop {
            if self.take(b'*') {
                total *= self.power()?;
            } else if self.take(b'/') {
                total /= self.power()?;
            } else {
                return Ok(total);
            }
        }
    }

    fn power(&mut self) -> Result<f64, Trouble> {
        let base = self.atom()?;
        if self.take(b'^') {
            return Ok(base.powf(self.atom()?));
        }
        Ok(base)
    }

    fn word(&mut self, more: impl Fn(u8) -> bool) -> String {
        let length = self.rest.iter().take_while(|&&c| more(c)).count();
        let (word, rest) = self.rest.split_at(length);
        self.rest = rest;
        String::from_utf8_lossy(word).into_owned()
    }

    fn atom(&mut self) -> Result<f64, Trouble> {
        if self.take(b'(') {
            let inner = self.sum()?;
            return if self.take(b')') {
                Ok(inner)
            } else {
                Err("a bracket stays open".to_owned())
            };
        }
        self.blanks();
        match self.rest.first() {
            Some(c) if c.is_ascii_digit() => {
                let number = self.word(|c| c.is_ascii_digit() || c == b'.');
                number.parse().map_err(|error| format!("{number}: {error}"))
            }
            Some(c) if c.is_ascii_alphabetic() => {
                let name = self.word(|c| c.is_ascii_alphanumeric() || c == b'_');
                self.named(&name)
            }
            _ => Err("a number or symbol is missing".to_owned()),
        }
    }

    fn named(&mut self, name: &str) -> Result<f64, Trouble> {
        if let Some(value) = (self.value)(name) {
            return Ok(value);
        }
        if name == "pi" {
            return Ok(std::f64::consts::PI);
        }
        let mut arguments = Vec::new();
        if self.take(b'(') {
            arguments.push(self.sum()?);
            while self.take(b',') {
                arguments.push(self.sum()?);
            }
            if !self.take(b')') {
                return Err(format!("the bracket of {name} stays open"));
            }
        }
        match (name, arguments.as_slice()) {
            ("sqrt", [x]) => Ok(x.sqrt()),
            ("cos", [x]) => Ok(x.cos()),
            ("asin", [x]) => Ok(x.asin()),
            ("atan", [x]) => Ok(x.atan()),
            ("max", [x, rest @ ..]) => Ok(rest.iter().fold(*x, |a, &b| a.max(b))),
            ("min", [x, rest @ ..]) => Ok(rest.iter().fold(*x, |a, &b| a.min(b))),
            _ => Err(format!("{name} has no value")),
        }
    }
}

#[test]
fn formulas_are_read() {
    let value = |symbol: &str| (symbol == "d_o").then_some(3.0);
    for (formula, expected) in [
        ("1 + 2 * d_o^2", 19.0),
        ("(128 / 2)^(1/4) - sqrt(8)", 0.0),
        ("min(4, max(1, 2), 3) / 8", 0.25),
        ("pi / pi - 1", 0.0),
    ] {
        let got = evaluate(formula, &value).unwrap();
        assert!((got - expected).abs() < 1e-15 * 8.0, "{formula}: {got}");
    }
    for bad in ["2 +", "sqrt(2", "x", "1 2", ""] {
        assert!(evaluate(bad, &value).is_err(), "{bad}");
    }
}
