//! A coarse cut of RON text: brackets, texts, comments, commas, and all the rest.
//!
//! The `ron` crate reads the values. This cut only answers what it cannot: which bracket a file
//! forgot, how deep it nests before any recursion starts, where a comma stands.

use std::ops::Range;

/// What a piece of the text is.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum TokenKind {
    /// `(`, `[` or `{`.
    Open(char),
    /// `)`, `]` or `}`.
    Close(char),
    /// A text in quotes, raw or not, with prefix.
    Text {
        /// Whether the closing quote is there.
        closed: bool,
        /// Whether it is a raw text such as `r"..."`.
        raw: bool,
    },
    /// A comment of either form.
    Comment {
        /// Whether a block comment ends; a line comment always does.
        closed: bool,
    },
    /// `,`.
    Comma,
    /// A word, a number or any other sign.
    Other,
}

/// One piece and the bytes it covers.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Token {
    pub(crate) kind: TokenKind,
    pub(crate) range: Range<usize>,
}

/// Walks over a text piece by piece; blank space is left out.
#[derive(Debug, Clone)]
pub(crate) struct Lexer<'a> {
    text: &'a str,
    at: usize,
}

impl<'a> Lexer<'a> {
    pub(crate) fn new(text: &'a str) -> Self {
        Self { text, at: 0 }
    }

    fn rest(&self) -> &'a str {
        &self.text[self.at..]
    }

    /// Length and kind of the piece at the start of `rest`.
    fn measure(rest: &str, first: char) -> (TokenKind, usize) {
        match first {
            '(' | '[' | '{' => (TokenKind::Open(first), 1),
            ')' | ']' | '}' => (TokenKind::Close(first), 1),
            ',' => (TokenKind::Comma, 1),
            '"' => Self::quoted(rest, 0),
            '\'' => (TokenKind::Other, Self::character(rest)),
            _ if rest.starts_with("//") => (
                TokenKind::Comment { closed: true },
                rest.find('\n').unwrap_or(rest.len()),
            ),
            _ if rest.starts_with("/*") => Self::block_comment(rest),
            _ if first.is_alphanumeric() || first == '_' => Self::word(rest),
            _ => (TokenKind::Other, first.len_utf8()),
        }
    }

    /// A word, or the text it is the prefix of: `r"..."`, `r#"..."#`, `b"..."`, `br"..."`.
    fn word(rest: &str) -> (TokenKind, usize) {
        let length = rest
            .find(|c: char| !c.is_alphanumeric() && c != '_')
            .unwrap_or(rest.len());
        let (word, tail) = rest.split_at(length);
        match word {
            "b" if tail.starts_with('"') => Self::quoted(rest, length),
            "b" if tail.starts_with('\'') => (TokenKind::Other, length + Self::character(tail)),
            "r" | "br" => Self::raw(rest, length).unwrap_or((TokenKind::Other, length)),
            _ => (TokenKind::Other, length),
        }
    }

    /// A text with escapes whose opening quote stands at `quote`.
    fn quoted(rest: &str, quote: usize) -> (TokenKind, usize) {
        let mut escaped = false;
        for (at, byte) in rest.bytes().enumerate().skip(quote + 1) {
            match byte {
                _ if escaped => escaped = false,
                b'\\' => escaped = true,
                b'"' => {
                    return (
                        TokenKind::Text {
                            closed: true,
                            raw: false,
                        },
                        at + 1,
                    );
                }
                _ => {}
            }
        }
        (
            TokenKind::Text {
                closed: false,
                raw: false,
            },
            rest.len(),
        )
    }

    /// A raw text whose prefix has `prefix` bytes; none when no quote follows.
    fn raw(rest: &str, prefix: usize) -> Option<(TokenKind, usize)> {
        let tail = &rest[prefix..];
        let hashes = tail.len() - tail.trim_start_matches('#').len();
        let body = tail[hashes..].strip_prefix('"')?;
        let ending = format!("\"{}", "#".repeat(hashes));
        let before = prefix + hashes + 1;
        Some(match body.find(&ending) {
            Some(at) => (
                TokenKind::Text {
                    closed: true,
                    raw: true,
                },
                before + at + ending.len(),
            ),
            None => (
                TokenKind::Text {
                    closed: false,
                    raw: true,
                },
                rest.len(),
            ),
        })
    }

    /// A character such as `'('` or `'\''`, so that its bracket does not count.
    fn character(rest: &str) -> usize {
        let mut letters = rest.char_indices().skip(1);
        let inner = match letters.next() {
            Some((_, '\\')) => letters.next(),
            other => other,
        };
        match (inner, letters.next()) {
            (Some(_), Some((at, '\''))) => at + 1,
            _ => 1,
        }
    }

    fn block_comment(rest: &str) -> (TokenKind, usize) {
        let mut level = 0_usize;
        let mut at = 0;
        while at < rest.len() {
            let here = &rest.as_bytes()[at..];
            if here.starts_with(b"/*") {
                level += 1;
                at += 2;
            } else if here.starts_with(b"*/") {
                level -= 1;
                at += 2;
                if level == 0 {
                    return (TokenKind::Comment { closed: true }, at);
                }
            } else {
                at += 1;
            }
        }
        (TokenKind::Comment { closed: false }, rest.len())
    }
}

impl Iterator for Lexer<'_> {
    type Item = Token;

    fn next(&mut self) -> Option<Token> {
        let rest = self.rest();
        let blank = rest.len() - rest.trim_start().len();
        self.at += blank;
        let rest = self.rest();
        let first = rest.chars().next()?;
        let (kind, length) = Self::measure(rest, first);
        let start = self.at;
        self.at += length;
        Some(Token {
            kind,
            range: start..self.at,
        })
    }
}

#[cfg(test)]
mod tests {
    use proptest::prelude::*;

    use super::*;

    fn cut(text: &str) -> Vec<(TokenKind, &str)> {
        Lexer::new(text)
            .map(|token| (token.kind, &text[token.range]))
            .collect()
    }

    #[test]
    fn pieces_are_told_apart() {
        use TokenKind::*;
        let text = "(a: \"x) \\\" \", // (\n/* [ /* ( */ */ b: r#\"q\" ( \"#, '(', 'x', r: 1.5)";
        let kinds: Vec<_> = cut(text)
            .into_iter()
            .filter(|(kind, _)| *kind != Other)
            .collect();
        let plain = Text {
            closed: true,
            raw: false,
        };
        let raw = Text {
            closed: true,
            raw: true,
        };
        let comment = Comment { closed: true };
        let expected = vec![
            (Open('('), "("),
            (plain, "\"x) \\\" \""),
            (Comma, ","),
            (comment, "// ("),
            (comment, "/* [ /* ( */ */"),
            (raw, "r#\"q\" ( \"#"),
            (Comma, ","),
            (Comma, ","),
            (Comma, ","),
            (Close(')'), ")"),
        ];
        assert_eq!(
            kinds, expected,
            "brackets inside texts, comments and characters do not count"
        );
    }

    #[test]
    fn open_ends_are_marked() {
        use TokenKind::*;
        for (text, last) in [
            (
                "\"abc",
                Text {
                    closed: false,
                    raw: false,
                },
            ),
            (
                "\"abc\\",
                Text {
                    closed: false,
                    raw: false,
                },
            ),
            (
                "r##\"abc\"#",
                Text {
                    closed: false,
                    raw: true,
                },
            ),
            ("/* /* */", Comment { closed: false }),
            ("// abc", Comment { closed: true }),
        ] {
            assert_eq!(cut(text), vec![(last, text)], "{text:?}");
        }
    }

    proptest! {
        #[test]
        fn every_byte_is_cut_once_and_nothing_panics(text in "[ \\n(){}\\[\\],\"'#rb/*\\\\aé0-9:]{0,60}") {
            let mut end = 0;
            for token in Lexer::new(&text) {
                prop_assert!(token.range.start >= end && token.range.end > token.range.start, "{:?}", token);
                prop_assert!(text[end..token.range.start].trim().is_empty(), "only blanks left out");
                end = token.range.end;
            }
            prop_assert!(text[end..].trim().is_empty(), "only blanks left over");
        }
    }
}
