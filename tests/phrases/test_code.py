"""The code of an answer is Python that asks the same question of the same fit."""

import ast
from dataclasses import replace

import numpy as np
import pandas as pd
import pytest
import statsmodels.api as sm
import statsmodels.formula.api as smf
from hypothesis import given
from hypothesis import strategies as st

import plainodds as po
from plainodds.answers.change import ChangeQuestion
from plainodds.answers.curve import CurveQuestion
from plainodds.answers.effects import EffectsQuestion
from plainodds.answers.moves import Move, Shift
from plainodds.answers.odds import OddsQuestion
from plainodds.answers.profile import ProfileQuestion
from plainodds.answers.where import Mask
from plainodds.model.predictors import Outcome, Predictor, Setting
from plainodds.phrases import code
from tests.phrases.made import curve_answer, odds_answer, odds_row, profile_answer, subject
from tests.phrases.made_changes import change_answer, effect_row, effects_answer

WIDTH = 88


class Recorder:
    """Stands for FittedLogit and for odds_of, and remembers how it was called."""

    Predictor, Outcome, Shift = Predictor, Outcome, Shift

    def __init__(self):
        self.calls = []

    def FittedLogit(self, *args, **kwargs):  # noqa: N802
        self.calls.append(("FittedLogit", args, kwargs))
        return self

    def __getattr__(self, name):
        def called(*args, **kwargs):
            self.calls.append((name, args, kwargs))
            return "the answer"

        return called


def calls_of(text, **namespace):
    """Run the code against a recorder in place of the package."""
    tree = ast.parse(text)
    first = tree.body.pop(0)
    assert ast.unparse(first) == "import plainodds as po"
    recorder = Recorder()
    held = {"po": recorder, "result": "result", "results": {}, **namespace}
    exec(compile(tree, "code", "exec"), held)
    assert held["answer"] == "the answer"
    return recorder.calls


def asked(question):
    """An answer whose question this is."""
    made = {
        CurveQuestion: curve_answer(),
        OddsQuestion: odds_answer(odds_row()),
        ProfileQuestion: profile_answer(),
        ChangeQuestion: change_answer(),
        EffectsQuestion: effects_answer(effect_row()),
    }
    return replace(made[type(question)], question=question)


def with_setting(**stated):
    setting = Setting(**stated)
    return replace(curve_answer(), subject=subject(setting=setting))


def test_the_plainest_code():
    assert code(asked(CurveQuestion("age_years", by="material"))) == (
        "import plainodds as po\n"
        "\n"
        "fit = po.FittedLogit(result)\n"
        'answer = fit.curve("age_years", by="material")\n'
    )


@pytest.mark.parametrize(
    ("question", "call"),
    [
        (OddsQuestion(), "fit.odds()"),
        (OddsQuestion(predictors=("a",)), 'fit.odds(predictors=("a",))'),
        (OddsQuestion(steps=(("a", 10),), level=0.9), 'fit.odds(steps={"a": 10}, level=0.9)'),
        (OddsQuestion(between=(("a", (20.0, 60.0)),)), 'fit.odds(between={"a": (20.0, 60.0)})'),
        (OddsQuestion(given=(("m", ("x", "y")),)), 'fit.odds(given={"m": ("x", "y")})'),
        (OddsQuestion(references=(("m", True),)), 'fit.odds(references={"m": True})'),
        (OddsQuestion(order="size"), 'fit.odds(order="size")'),
        (OddsQuestion(interval="likelihood"), 'fit.odds(interval="likelihood")'),
        (ChangeQuestion((("a", Move(20, 60)),)), 'fit.change("a", 20, 60)'),
        (ChangeQuestion((("m", Move("x", "y")),)), 'fit.change("m", "x", "y")'),
        (
            ChangeQuestion((("a", Shift(by=-10, lowest=0)),)),
            'fit.change("a", po.Shift(by=-10, lowest=0))',
        ),
        (
            ChangeQuestion((("a", Move(60, 0)), ("m", Move("x", "y")))),
            'fit.change({"a": (60, 0), "m": ("x", "y")})',
        ),
        (
            ChangeQuestion((("a", Shift(times=1.1)), ("m", Move("x", "y"))), level=0.9),
            'fit.change({"a": po.Shift(times=1.1), "m": ("x", "y")}, level=0.9)',
        ),
        (
            ChangeQuestion((("a", Move(0, 1)),), others=(("b", 2),)),
            'fit.change("a", 0, 1, others={"b": 2})',
        ),
        (
            ChangeQuestion((("a", Move(0, 1)),), where=(("b", (2, 3)), ("m", "x"))),
            'fit.change("a", 0, 1, where={"b": (2, 3), "m": "x"})',
        ),
        (
            ChangeQuestion((("a", Move(0, 1)),), where=Mask(3, "ab"), sample="drawn"),
            'fit.change("a", 0, 1, where=mask, sample="drawn")',
        ),
        (EffectsQuestion(), "fit.effects()"),
        (
            EffectsQuestion(("a",), number="step", by="m", where=Mask(3, "ab")),
            'fit.effects(predictors=("a",), number="step", by="m", where=mask)',
        ),
        (EffectsQuestion(others=(("a", 1),)), 'fit.effects(others={"a": 1})'),
        (CurveQuestion("a", others="observed"), 'fit.curve("a", others="observed")'),
        (CurveQuestion("a", others=(("b", 1),)), 'fit.curve("a", others={"b": 1})'),
        (CurveQuestion("a", at=(1.0, 2.5)), 'fit.curve("a", at=(1.0, 2.5))'),
        (CurveQuestion("a", scale="slope"), 'fit.curve("a", scale="slope")'),
        (ProfileQuestion(), "fit.profile()"),
        (ProfileQuestion((("a", 40.0),)), 'fit.profile({"a": 40.0})'),
        (
            ProfileQuestion((("a", 40),), (("a", 20),)),
            'fit.profile({"a": 40}, against={"a": 20})',
        ),
        (ProfileQuestion(against=()), "fit.profile(against={})"),
    ],
)
def test_a_question_is_written_as_the_call_that_asks_it(question, call):
    assert code(asked(question)).splitlines()[-1] == f"answer = {call}"


def test_defaults_are_left_out_and_nothing_else():
    question = CurveQuestion("a", "b", ("x",), (("c", 1.5),), "odds", (1.0,), 0.8)
    (_, (name, args, kwargs)) = calls_of(code(asked(question)))
    assert (name, args) == ("curve", ("a",))
    assert kwargs == {
        "by": "b",
        "by_values": ("x",),
        "others": {"c": 1.5},
        "scale": "odds",
        "at": (1.0,),
        "level": 0.8,
    }


@given(
    st.dictionaries(
        st.text(),
        st.one_of(
            st.text(),
            st.integers(),
            st.booleans(),
            st.floats(allow_nan=False),
        ),
        max_size=8,
    )
)
def test_any_names_and_values_come_back_as_they_were(values):
    question = ProfileQuestion(tuple(values.items()), tuple(reversed(values.items())))
    text = code(asked(question))
    (_, (_, args, kwargs)) = calls_of(text)
    assert (list(args) or [{}]) == [values]
    assert kwargs == {"against": values}
    given_back = args[0] if args else {}
    assert [type(held) for held in given_back.values()] == [type(v) for v in values.values()]


@given(st.lists(st.text(alphabet=st.characters(codec="utf-8"), max_size=20), max_size=12))
def test_lines_break_before_they_grow_long(levels):
    text = code(asked(CurveQuestion("x" * 30, by="b", by_values=tuple(levels))))
    longest = max([len(repr(level)) for level in levels], default=0)
    for line in text.splitlines():
        assert len(line) <= max(WIDTH, longest + len("    ") * 2 + 1)
    (_, (_, _, kwargs)) = calls_of(text)
    assert kwargs.get("by_values", ()) == tuple(levels)


def test_quotes_and_lines_survive():
    strange = "it's \"so\"\n\\n {x} \N{GREEK SMALL LETTER PI}\t'''"
    (_, (_, args, _)) = calls_of(code(asked(ProfileQuestion(((strange, strange),)))))
    assert args == ({strange: strange},)


def test_what_the_analyst_stated_is_stated_again():
    predictors = {
        "age_years": Predictor(label="Pipe age", unit="years", step=10),
        "material": Predictor(
            levels=("CI", "DI"), level_labels={"CI": "cast iron", "DI": "ductile iron"}
        ),
        "share": Predictor(kind="number", range=(0, 1), typical=0.5),
    }
    outcome = Outcome(event="burst this winter", case="pipe", cases="pipes", level=True)
    answer = with_setting(
        predictors=tuple(predictors.items()),
        outcome=outcome,
        derived=(("age_sq", "age_years ** 2"),),
        functions=("rise",),
        offset=2.5,
        with_data=True,
    )
    text = code(answer)
    ((name, args, kwargs), _) = calls_of(text, data="data", rise=abs)
    assert (name, args) == ("FittedLogit", ("result",))
    assert kwargs == {
        "data": "data",
        "predictors": predictors,
        "outcome": outcome,
        "derived": {"age_sq": "age_years ** 2"},
        "functions": {"rise": abs},
        "offset": 2.5,
    }
    assert 'po.Predictor(label="Pipe age", unit="years", step=10)' in text
    assert all(len(line) <= WIDTH for line in text.splitlines())


def test_a_function_whose_name_python_cannot_read_is_looked_up():
    text = code(with_setting(functions=("class", "my.rise")))
    functions = {"class": abs, "my.rise": len}
    ((_, _, kwargs), _) = calls_of(text, functions=functions)
    assert kwargs == {"functions": functions}


def test_an_infinite_number_is_python_too():
    infinite = Predictor(range=(0.0, float("inf")))
    ((_, _, kwargs), _) = calls_of(code(with_setting(predictors=(("a", infinite),))))
    assert kwargs == {"predictors": {"a": infinite}}


def test_which_rows_a_mask_stands_for_is_said_in_a_comment():
    question = EffectsQuestion(where=Mask(1234, "ab"))
    assert code(asked(question)).splitlines()[-2:] == [
        "# mask: one True or False for each row used, 1,234 of them True",
        "answer = fit.effects(where=mask)",
    ]
    assert "mask" not in code(asked(EffectsQuestion(where=(("a", 1),))))


def test_how_the_sample_came_is_stated_again():
    text = code(with_setting(sampling="case-control", prevalence=0.02))
    assert 'po.FittedLogit(result, sampling="case-control", prevalence=0.02)' in text
    assert "sampling" not in code(with_setting(prevalence=0.02))


def test_several_models_are_asked_together():
    question = OddsQuestion(predictors=("a",), models=("crude", "it's"))
    text = code(asked(question))
    assert text.startswith("import plainodds as po\n\nanswer = po.odds_of(")
    results = {"crude": 1, "it's": 2}
    ((name, args, kwargs),) = calls_of(text, results=results)
    assert (name, args, kwargs) == ("odds_of", (results,), {"predictors": ("a",)})


def rise(x):
    """A function of the analyst's own."""
    return np.sqrt(x)


@pytest.fixture(scope="module")
def frame():
    rng = np.random.default_rng(20)
    n = 400
    frame = pd.DataFrame(
        {
            "age": rng.integers(0, 90, n).astype(float),
            "site": rng.choice(["a", "b's", 'c"'], n),
            "lined": rng.random(n) < 0.4,
            "visits": rng.integers(0, 5, n),
        }
    )
    eta = -2 + 0.03 * frame["age"] + 0.5 * frame["lined"] - 0.4 * (frame["site"] == "a")
    frame["y"] = (rng.random(n) < 1 / (1 + np.exp(-eta))).astype(int)
    return frame


@pytest.fixture(scope="module")
def result(frame):
    return smf.logit("y ~ age * lined + C(site) + visits", frame).fit(disp=False)


@pytest.fixture(scope="module")
def fit(result):
    return po.FittedLogit(
        result,
        predictors={"age": po.Predictor(label="Age", unit="years", step=10)},
        outcome=po.Outcome(event="a visit", case="person", cases="people"),
    )


def again(answer, **namespace):
    """What the answer's code gives in a namespace of its own."""
    held = dict(namespace)
    exec(compile(code(answer), "code", "exec"), held)
    return held["answer"]


@pytest.mark.parametrize(
    "ask",
    [
        lambda fit: fit.odds(),
        lambda fit: fit.odds("age", steps={"age": 5}, given={"lined": [True]}, level=0.9),
        lambda fit: fit.odds(["site"], references={"site": "b's"}, order="size"),
        lambda fit: fit.odds(between={"age": (20, 60)}),
        lambda fit: fit.curve("age"),
        lambda fit: fit.curve("age", by="site", others="observed"),
        lambda fit: fit.curve("age", by="lined", scale="slope", at=[10, 20.5]),
        lambda fit: fit.curve("site", by="visits", by_values=[0, 2], others={"age": 40}),
        lambda fit: fit.curve("visits", scale="odds", level=0.8),
        lambda fit: fit.odds("visits", interval="likelihood"),
        lambda fit: fit.change("age", 20, 60),
        lambda fit: fit.change("site", "a", "b's", others="typical"),
        lambda fit: fit.change("age", po.Shift(by=-10, lowest=0), sample="drawn"),
        lambda fit: fit.change({"age": (60, 0), "site": ("a", 'c"')}, others={"visits": 2}),
        lambda fit: fit.change({"age": po.Shift(times=1.1), "lined": (False, True)}),
        lambda fit: fit.change("visits", 0, 1, where={"age": (20, 60), "site": ["a", "b's"]}),
        lambda fit: fit.change("age", 20, 60, where={}),
        lambda fit: fit.effects(),
        lambda fit: fit.effects(["age", "site"], number="step", by="lined", level=0.9),
        lambda fit: fit.effects(others={"age": 40}, by="site"),
        lambda fit: fit.effects(where={"lined": True}, sample="drawn"),
        lambda fit: fit.profile(),
        lambda fit: fit.profile({"site": 'c"', "lined": True, "age": np.float64(33.3)}),
        lambda fit: fit.profile({"age": 60}, against={"age": 20, "lined": True}, level=0.99),
    ],
)
def test_the_code_of_a_real_answer_gives_an_equal_answer(fit, result, ask):
    answer = ask(fit)
    assert again(answer, result=result) == answer


@pytest.mark.parametrize(
    "ask",
    [
        lambda fit, mask: fit.change("age", 20, 60, where=mask),
        lambda fit, mask: fit.change("age", po.Shift(by=5, highest=90), where=mask),
        lambda fit, mask: fit.effects(where=mask, by="site"),
    ],
)
def test_the_code_of_an_answer_about_masked_rows_wants_the_mask(fit, frame, result, ask):
    mask = (frame["age"] > 40).to_numpy()
    answer = ask(fit, mask)
    assert again(answer, result=result, mask=mask) == answer
    assert again(answer, result=result, mask=~mask) != answer
    with pytest.raises(NameError, match="mask"):
        again(answer, result=result)


@pytest.mark.parametrize("stated", [{"prevalence": 0.02}, {"sampling": "cohort"}])
def test_the_code_states_how_the_sample_came(result, stated):
    answer = po.FittedLogit(result, **stated).change("age", 20, 60)
    assert again(answer, result=result) == answer


def test_the_code_of_several_models_gives_an_equal_answer(frame, result):
    results = {"crude": smf.logit("y ~ age", frame).fit(disp=False), "adjusted": result}
    answer = po.odds_of(results, "age", steps={"age": 10})
    assert again(answer, results=results) == answer


def test_derived_columns_and_data_are_handed_over_again(frame):
    squared = frame.assign(age_sq=frame["age"] ** 2)
    design = sm.add_constant(squared[["age", "age_sq", "visits"]].astype(float))
    result = sm.Logit(squared["y"], design).fit(disp=False)
    fit = po.FittedLogit(result, data=squared, derived={"age_sq": "age ** 2"})
    answer = fit.curve("age", scale="slope")
    assert again(answer, result=result, data=squared) == answer


def test_an_offset_is_stated_again(frame):
    offset = np.log1p(frame["visits"])
    model = sm.GLM.from_formula("y ~ age", frame, family=sm.families.Binomial(), offset=offset)
    result = model.fit()
    answer = po.FittedLogit(result, offset=0.5).profile({"age": 30})
    assert "offset=0.5" in code(answer)
    assert again(answer, result=result) == answer


def test_functions_of_ones_own_are_handed_over_again(frame):
    result = smf.logit("y ~ rise(age) + visits", frame).fit(disp=False)
    answer = po.FittedLogit(result, functions={"rise": rise}).curve("age", scale="slope")
    assert 'functions={"rise": rise}' in code(answer)
    assert again(answer, result=result, rise=rise) == answer
