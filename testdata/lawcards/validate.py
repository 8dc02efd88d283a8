"""Holds the schema of law cards and every card of this folder to the JSON Schema standard, by a general-purpose validator.

usage: python3 validate.py        (needs the package jsonschema; written against 4.26)

The project's own tests have a validator of the keywords the schema uses; this one is outside the project.
"""
import glob
import json
import os

from jsonschema import Draft202012Validator

here = os.path.dirname(os.path.abspath(__file__))
with open(os.path.join(here, "../../creeplaw/lawcard/schema.json"), encoding="utf-8") as f:
    schema = json.load(f)
Draft202012Validator.check_schema(schema)  # the schema itself, against the meta-schema of the draft
validator = Draft202012Validator(schema)
cards = sorted(glob.glob(os.path.join(here, "*.json")))
for path in cards:
    with open(path, encoding="utf-8") as f:
        validator.validate(json.load(f))
print(len(cards), "cards follow the schema")
