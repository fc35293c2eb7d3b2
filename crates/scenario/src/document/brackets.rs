//! Which brackets belong together, and which were forgotten.

use super::lexer::{Lexer, Token, TokenKind};

/// What the brackets of a text say about it.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(super) enum Balance {
    /// Every bracket, text and comment is closed.
    Balanced,
    /// The text ends inside something.
    Unclosed {
        /// Where that begins.
        open: usize,
        /// What it is: a bracket in backquotes, `text` or `comment`.
        what: String,
        /// A bracket that more likely lacks its partner: the first whose partner stands at
        /// another indentation.
        suspect: Option<usize>,
    },
    /// A bracket is closed by one of another kind.
    Crossed {
        /// The opening bracket.
        open: usize,
        /// The wrong closing one.
        close: usize,
    },
}

/// Pairs the brackets of a text.
pub(super) fn balance(text: &str) -> Balance {
    let mut open: Vec<(char, usize)> = Vec::new();
    let mut suspect = None;
    for Token { kind, range } in Lexer::new(text) {
        let start = range.start;
        match kind {
            TokenKind::Open(bracket) => open.push((bracket, start)),
            TokenKind::Close(bracket) => {
                let Some((opening, at)) = open.pop() else {
                    continue;
                };
                if partner(opening) != bracket {
                    return Balance::Crossed {
                        open: at,
                        close: start,
                    };
                }
                let moved = first_of_line(text, start) && indent(text, start) != indent(text, at);
                if moved && suspect.is_none() {
                    suspect = Some(at);
                }
            }
            TokenKind::Text { closed: false, .. } => {
                return Balance::Unclosed {
                    open: start,
                    what: "text".to_owned(),
                    suspect: None,
                };
            }
            TokenKind::Comment { closed: false } => {
                return Balance::Unclosed {
                    open: start,
                    what: "comment".to_owned(),
                    suspect: None,
                };
            }
            TokenKind::Text { .. }
            | TokenKind::Comment { .. }
            | TokenKind::Comma
            | TokenKind::Other => {}
        }
    }
    match open.pop() {
        Some((bracket, at)) => Balance::Unclosed {
            open: at,
            what: format!("`{bracket}`"),
            suspect,
        },
        None => Balance::Balanced,
    }
}

/// The first bracket that opens more than `limit` levels at once.
pub(super) fn too_deep(text: &str, limit: usize) -> Option<usize> {
    let mut level = 0_usize;
    for Token { kind, range } in Lexer::new(text) {
        match kind {
            TokenKind::Open(_) => level += 1,
            TokenKind::Close(_) => level = level.saturating_sub(1),
            _ => {}
        }
        if level > limit {
            return Some(range.start);
        }
    }
    None
}

/// The text in plain quotes that ends last before `offset`, if it runs over a line end: most
/// likely its closing quote is missing.
pub(super) fn runaway_text(text: &str, offset: usize) -> Option<usize> {
    let plain = TokenKind::Text {
        closed: true,
        raw: false,
    };
    let before = Lexer::new(text).take_while(|token| token.range.start < offset);
    let last = before.filter(|token| token.kind == plain).last()?;
    text[last.range.clone()]
        .contains('\n')
        .then_some(last.range.start)
}

fn partner(opening: char) -> char {
    match opening {
        '(' => ')',
        '[' => ']',
        _ => '}',
    }
}

fn line_start(text: &str, offset: usize) -> usize {
    text[..offset].rfind('\n').map_or(0, |at| at + 1)
}

fn first_of_line(text: &str, offset: usize) -> bool {
    text[line_start(text, offset)..offset].trim().is_empty()
}

fn indent(text: &str, offset: usize) -> usize {
    let line = &text[line_start(text, offset)..];
    line.len() - line.trim_start_matches([' ', '\t']).len()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn balanced_crossed_and_unclosed_texts_are_told_apart() {
        assert_eq!(
            balance("(a: [1, (2)], b: \")\")"),
            Balance::Balanced,
            "all closed"
        );
        assert_eq!(
            balance("(a: [1, 2))"),
            Balance::Crossed { open: 4, close: 9 },
            "[ closed by )"
        );
        let unclosed = |open, what: &str, suspect| Balance::Unclosed {
            open,
            what: what.to_owned(),
            suspect,
        };
        assert_eq!(balance("(a: ["), unclosed(4, "`[`", None), "the innermost");
        assert_eq!(balance("(a: \"x"), unclosed(4, "text", None), "a text");
        assert_eq!(balance("( /* "), unclosed(2, "comment", None), "a comment");
    }

    #[test]
    fn indentation_betrays_the_forgotten_bracket() {
        let text = "(\n    valve: (\n        mass: \"110 g\",\n    pump: (\n    ),\n)\n";
        let valve = text.find("valve: (").expect("there") + "valve: ".len();
        let expected = Balance::Unclosed {
            open: 0,
            what: "`(`".to_owned(),
            suspect: Some(valve),
        };
        assert_eq!(
            balance(text),
            expected,
            "the bracket of the valve was closed at the margin"
        );
    }

    #[test]
    fn depth_is_measured_without_recursion() {
        let text = "[".repeat(1_000_000);
        assert_eq!(
            too_deep(&text, 24),
            Some(24),
            "the bracket that goes too far"
        );
        assert_eq!(too_deep("((()))(())", 3), None, "three levels are three");
    }

    #[test]
    fn a_text_over_lines_is_suspect() {
        let text = "(a: \"20 mm,\n b: \"x\")";
        assert_eq!(
            runaway_text(text, text.find('x').expect("there")),
            Some(4),
            "the first quote"
        );
        assert_eq!(
            runaway_text("(a: \"20 mm\" b", 12),
            None,
            "an ordinary text"
        );
    }
}
