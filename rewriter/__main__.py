"""Run the command line as `python -m rewriter`."""

from rewriter.cli.main import main

if __name__ == "__main__":
    main()
