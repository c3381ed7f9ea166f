"""The one owner of every slang object: dropping a compilation while symbols live would crash the process."""

# pyright: reportUnknownMemberType=false, reportUnknownVariableType=false, reportUnknownArgumentType=false
# pyright: reportUnnecessaryComparison=false
# (pyslang's stubs leave `span[…]` undefined and do not tell what can be None)

import codecs
import difflib
import os
from collections.abc import Sequence
from dataclasses import replace
from pathlib import Path

import pyslang
from pyslang.analysis import AnalysisManager
from pyslang.ast import Compilation, InstanceBodySymbol, InstanceSymbol
from pyslang.driver import Driver
from pyslang.syntax import SyntaxTree

from rewriter.frontend.arguments import configure, open_arguments, slang_words
from rewriter.frontend.command_files import Word, read_bytes
from rewriter.frontend.diagnostics import captured_stderr, check_version
from rewriter.frontend.places import Locator
from rewriter.model.design import Note
from rewriter.model.errors import CompileError, UserError
from rewriter.model.source import RtlSource, SourceText


class Parsed:
    """Own the driver, its trees and the texts they were parsed from."""

    def __init__(self, source: RtlSource, library_dirs: Sequence[str] = (), extensions: Sequence[str] = ()) -> None:
        check_version()
        given = source.by_path
        self._arguments = slang_words(_on_disk(source), library_dirs, extensions)
        self.driver, self.extra_trees, self.warnings = self._parse(source, given)
        self.manager = self.driver.sourceManager
        self.locator = Locator(self.manager)
        texts = self._texts(given)
        mended = {path: text for path, text in texts.items() if path not in given and not _is_utf8(text.data)}
        if mended:  # a header that slang read before we knew of its bytes
            self.driver, self.extra_trees, self.warnings = self._parse(source, {**given, **mended})
            self.manager = self.driver.sourceManager
            self.locator = Locator(self.manager)
        trees = [tree.root for tree in self.driver.syntaxTrees if tree.isLibraryUnit]
        libraries = tuple(dict.fromkeys(self.locator.span(root.sourceRange).file for root in trees))
        self.source = RtlSource(
            source.files,
            libraries,
            source.include_dirs,
            source.defines,
            source.undefines,
            source.tops,
            source.parameters,
            source.options,
            tuple(texts.values()),
        )

    def _parse(self, source: RtlSource, texts: dict[str, SourceText]) -> tuple[Driver, list[SyntaxTree], list[str]]:
        driver = Driver()
        warnings = configure(driver, self._arguments)
        manager = driver.sourceManager
        virtual: list[SyntaxTree] = []
        files = frozenset(source.files)
        for path, text in texts.items():
            buffer = manager.assignText(path, _decode(text.data))
            if path in files and not os.path.exists(path):  # noqa: PTH110 (they are strings, and many)
                virtual.append(SyntaxTree.fromBuffer(buffer, manager, driver.createOptionBag()))
        driver.parseAllSources()
        return driver, virtual, warnings

    def _texts(self, given: dict[str, SourceText]) -> dict[str, SourceText]:
        paths = (path for path in self.locator.paths if os.path.isabs(path))  # noqa: PTH117 (they are strings)
        return {path: given.get(path) or SourceText(path, Path(path).read_bytes()) for path in paths}


class Elaboration:
    """Own the elaborated design; everything below it dies with it."""

    def __init__(self, parsed: Parsed) -> None:
        self.parsed = parsed
        self.locator = parsed.locator
        with captured_stderr():  # slang prints that a top is unknown; we say it with a way out
            self.compilation: Compilation = parsed.driver.createCompilation()
            for tree in parsed.extra_trees:
                self.compilation.addSyntaxTree(tree)
            self._check_tops()
            diagnostics = self.compilation.getAllDiagnostics()
        self._stop_at_errors(diagnostics)
        self.tops = self._tops()
        self._check_parameters()
        self._analysis: AnalysisManager | None = None

    @property
    def analysis(self) -> AnalysisManager:
        """Give slang's analysis of drivers, run at first use."""
        if self._analysis is None:
            self._analysis = self.parsed.driver.runAnalysis(self.compilation)
        return self._analysis

    @property
    def warnings(self) -> tuple[Note, ...]:
        """Give what slang warned of while it read the arguments."""
        return tuple(Note(text) for text in self.parsed.warnings)

    def place(self, location: pyslang.SourceLocation) -> str:
        """Write a location as `file:line:col`."""
        span = self.locator.span(pyslang.SourceRange(location, location))
        text = self.parsed.source.by_path.get(span.file)
        if text is None:
            return ""
        line, column = text.line_column(span.start)
        return f"{span.file}:{line}:{column}"

    def with_tops(self, tops: tuple[str, ...]) -> RtlSource:
        """Give the source with the tops that were found."""
        return replace(self.parsed.source, tops=tops)

    def _stop_at_errors(self, diagnostics: pyslang.Diagnostics) -> None:
        engine = self.parsed.driver.diagEngine
        printed = pyslang.TextDiagnosticClient()  # the driver's own prints when the driver dies
        engine.clearClients()
        engine.addClient(printed)
        engine.setIgnoreAllWarnings(True)
        engine.setSeverity(pyslang.Diags.UnknownModule, pyslang.DiagnosticSeverity.Ignored)
        before = engine.numErrors
        engine.issue(diagnostics)  # (after clearCounts() it would print nothing)
        if engine.numErrors > before:
            raise CompileError(printed.getString())

    def _check_tops(self) -> None:
        names = [definition.name for definition in self.compilation.getDefinitions()]
        if not names:
            raise UserError("the files hold no module", help="check the file list and the `ifdef lines")
        for top in self.parsed.source.tops:
            if top.rpartition(".")[2] not in names:
                close = difflib.get_close_matches(top, names, 5) or sorted(names)[:10]
                raise UserError(f"there is no module named {top}", help=f"known modules: {', '.join(close)}")

    def _tops(self) -> tuple[InstanceSymbol, ...]:
        tops = tuple(self.compilation.getRoot().topInstances)
        if not tops:
            raise UserError("no module can be the top", help="name one with --top (its parameters need values)")
        if len(tops) > 1 and not self.parsed.source.tops:
            listed = ", ".join(top.name for top in tops)
            raise UserError(f"several modules could be the top: {listed}", help="choose one with --top")
        return tops

    def _check_parameters(self) -> None:
        """Find -G names that no top has; slang passes over them in silence."""
        known = [symbol.name for top in self.tops for symbol in body_of(top).parameters if not symbol.isLocalParam]
        for given in self.parsed.source.parameters:
            name = given.partition("=")[0].strip()
            if name not in known:
                tops = ", ".join(top.name for top in self.tops)
                listed = ", ".join(dict.fromkeys(known)) or "none"
                raise UserError(f"-G {name}: {tops} has no such parameter", help=f"its parameters: {listed}")


def body_of(instance: InstanceSymbol) -> InstanceBodySymbol:
    """Give the body that was analysed: the canonical one where the instance shares it."""
    return instance.body if instance.canonicalBody is None else instance.canonicalBody


def parse(arguments: Sequence[str], folder: str) -> Parsed:
    """Open up RTL arguments and parse every file.

    Raises:
        UserError: a file is missing, a folder, unreadable or no text; slang refuses an option.
    """
    opened = open_arguments(arguments, folder)
    texts = {path: _read(path, word) for path, word in (*opened.library_files, *opened.files)}
    source = RtlSource(
        files=tuple(dict.fromkeys(path for path, _ in opened.files)),
        library_files=tuple(path for path, _ in opened.library_files),
        include_dirs=tuple(opened.include_dirs),
        defines=tuple(opened.defines),
        undefines=tuple(opened.undefines),
        tops=tuple(dict.fromkeys(opened.tops)),
        parameters=tuple(opened.parameters),
        options=tuple(opened.options),
        texts=tuple(texts.values()),
    )
    return Parsed(source, opened.library_dirs, opened.library_extensions)


def _read(path: str, word: Word) -> SourceText:
    return SourceText(path, read_bytes(word, path, "file"))


def _on_disk(source: RtlSource) -> RtlSource:
    """Leave out files that exist only as text; they are parsed from memory."""
    texts = source.by_path
    files = tuple(path for path in source.files if path not in texts or os.path.exists(path))  # noqa: PTH110
    return RtlSource(
        files,
        source.library_files,
        source.include_dirs,
        source.defines,
        source.undefines,
        source.tops,
        source.parameters,
        source.options,
    )


def _is_utf8(data: bytes) -> bool:
    try:
        data.decode()
    except UnicodeDecodeError:
        return False
    return True


def _decode(data: bytes) -> str:
    """Give text in which every byte keeps its offset: bytes that are no UTF-8 become `?` one for one."""
    return data.decode(errors=_ONE_FOR_ONE)


def _question_marks(error: UnicodeError) -> tuple[str, int]:
    assert isinstance(error, UnicodeDecodeError)  # noqa: S101 (registered for decoding alone)
    return "?" * (error.end - error.start), error.end


_ONE_FOR_ONE = "one-for-one"
codecs.register_error(_ONE_FOR_ONE, _question_marks)
