"""Inserted names are readable, free and stable."""

import pytest
from hypothesis import given
from hypothesis import strategies as st

from rewriter.edit.names import CELL_FORMS, KEYWORDS, Names, common_free, is_plain, sanitised
from rewriter.edit.text import renamed, words


@given(st.text(min_size=1, max_size=20))
def test_every_identifier_becomes_a_plain_name(name: str) -> None:
    assert is_plain(sanitised(name))


@pytest.mark.parametrize("name, plain", [("q", "q"), ("\\q+1 ", "q_1"), ("2nd", "r_2nd"), ("a$b", "a_b"), ("_x", "_x")])
def test_names_stay_readable(name: str, plain: str) -> None:
    assert sanitised(name) == plain


def test_a_name_is_free_in_all_its_forms_and_the_same_each_time() -> None:
    for _ in range(2):
        names = Names({"q", "gclk_q", "\\u_icg_q_2 "})
        assert [names.reserve("q", CELL_FORMS) for _ in range(2)] == ["q_3", "q_4"]


def test_keywords_are_never_given() -> None:
    assert Names(()).reserve("always_ff", ("{}",)) == "always_ff_2"
    assert {"logic", "wire", "endmodule", "unique0", "s_until_with"} <= KEYWORDS


def test_one_name_for_several_definitions() -> None:
    assert common_free("test_en", (frozenset({"a"}), frozenset({"test_en"}), frozenset({"test_en_2"}))) == "test_en_3"


def test_local_names_take_one_suffix() -> None:
    assert Names({"a", "b", "b_i"}).suffixed(["a", "b"], "_i") == {"a": "a_i2", "b": "b_i2"}


def test_names_are_replaced_only_where_they_are_names() -> None:
    text = 'a = s.a + `a + pkg::a + 4\'ha + "a" + \\a + a$ + a; // a'
    assert renamed(text, {"a": "b"}) == 'b = s.a + `a + pkg::a + 4\'ha + "a" + \\a + a$ + b; // a'
    assert words("a <= 3'b 0x1 + b.c;") == {"a", "b"}
